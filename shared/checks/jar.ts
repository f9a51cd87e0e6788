/** Jar and jug: what they hold, and how fine they can be read. Capacity and marks come from the register of kits. */
import { sinceStart } from '../trial/clock.ts'
import { levelsBeforeTopups } from '../trial/measure-fuel.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure, inside, valued } from './text.ts'

const LEVELS = ['jar_start_ml', 'jar_end_ml'] as const

const levels = (ctx: CheckContext) =>
  LEVELS.flatMap((key) => {
    const value = ctx.number(key)
    return value === null ? [] : [{ key, value }]
  })

function computed(ctx: CheckContext) {
  const { run, fuel } = ctx
  if (run.state !== 'known' || !fuel.known || fuel.value <= 0) return []
  return levelsBeforeTopups(ctx.readings, fuel, (text) => sinceStart(run, text), run.gross_min)
}

const q04: Rule = {
  id: 'Q04',
  version: 1,
  name: 'jar over full',
  severity: ['stop'],
  cells: [...LEVELS],
  why: 'A jar holds what it holds (register of kits).',
  check: (ctx) =>
    levels(ctx)
      .filter(({ value }) => value < 0 || value > ctx.kit.jarCapacity_ml)
      .map(({ key, value }) =>
        found('stop', [key], `${valued(ctx.label(key), `${value} mL`)}: the jar holds ${ctx.kit.jarCapacity_ml} mL.`, {
          [key]: value,
          capacity_ml: ctx.kit.jarCapacity_ml,
        }),
      ),
}

const q05: Rule = {
  id: 'Q05',
  version: 1,
  name: 'jar overflows at a top-up',
  severity: ['doubt'],
  cells: ['jar_start_ml', 'topup_ml', 'topup_t', 'jar_end_ml'],
  why: 'Poured in at that minute, the jar would spill [P].',
  check: (ctx) =>
    computed(ctx)
      .filter(({ topup, level_ml }) => level_ml + topup.value > ctx.kit.jarCapacity_ml)
      .map(({ topup, level_ml, timeKey }) =>
        found(
          'doubt',
          [topup.key, timeKey, 'jar_start_ml'],
          `${ctx.label(topup.key)}: ${topup.value} mL at ${ctx.text(timeKey)} on about ${figure(level_ml, 0)} mL is more than the jar's ${ctx.kit.jarCapacity_ml} mL.`,
          { topup_ml: topup.value, level_ml, capacity_ml: ctx.kit.jarCapacity_ml },
        ),
      ),
}

const q06: Rule = {
  id: 'Q06',
  version: 1,
  name: 'jar finer than its marks',
  severity: ['doubt', 'note'],
  cells: [...LEVELS],
  why: 'Between two marks only half-way can be judged (JCGM 100 F.2.2.1).',
  check: (ctx) =>
    levels(ctx).flatMap(({ key, value }) => {
      const mark = ctx.kit.jarMark_ml
      if (value % mark === 0) return []
      const compared = { [key]: value, mark_ml: mark }
      if (value % mark === mark / 2)
        return [
          found('note', [key], `${valued(ctx.label(key), `${value} mL`)} stands half-way between marks of ${mark} mL.`, compared),
        ]
      return [
        found('doubt', [key], `${valued(ctx.label(key), `${value} mL`)} is finer than the jar's marks of ${mark} mL.`, compared),
      ]
    }),
}

const q07: Rule = {
  id: 'Q07',
  version: 1,
  name: 'jug finer than its marks',
  severity: ['stop', 'doubt', 'note'],
  cells: ['topup_ml'],
  why: 'The jug has marks and a top; more than it holds is several fillings.',
  check: (ctx) =>
    ctx.all('topup_ml').flatMap(({ key, value }): Found[] => {
      const { jugMark_ml: mark, jugCapacity_ml: most } = ctx.kit
      if (value > most)
        return [
          found('stop', [key], `${valued(ctx.label(key), `${value} mL`)}: the jug holds ${most}. Write each filling by itself.`, {
            [key]: value,
            capacity_ml: most,
          }),
        ]
      if (value % mark === 0) return []
      const compared = { [key]: value, mark_ml: mark }
      if (value % mark === mark / 2)
        return [
          found(
            'note',
            [key],
            `${valued(ctx.label(key), `${value} mL`)} stands half-way between the jug's marks of ${mark} mL.`,
            compared,
          ),
        ]
      return [
        found('doubt', [key], `${valued(ctx.label(key), `${value} mL`)} is finer than the jug's marks of ${mark} mL.`, compared),
      ]
    }),
}

const q10: Rule = {
  id: 'Q10',
  version: 1,
  name: 'jar ran low',
  severity: ['doubt'],
  cells: [...LEVELS, 'topup_t'],
  why: 'Under this level the outlet uncovers and air is drawn [P].',
  check: (ctx) => {
    const least = ctx.limit('jar_lowest_ml')
    const written = levels(ctx)
      .filter(({ value }) => value >= 0 && value < least)
      .map(({ key, value }) =>
        found('doubt', [key], `${valued(ctx.label(key), `${value} mL`)}: under ${least} mL the outlet draws air.`, {
          [key]: value,
          least_ml: least,
        }),
      )
    const between = computed(ctx)
      .filter(({ level_ml }) => level_ml < least)
      .map(({ topup, level_ml, timeKey }) =>
        found(
          'doubt',
          [timeKey, topup.key],
          `About ${figure(level_ml, 0)} mL was left before ${inside(ctx.label(topup.key))}: under ${least} mL the outlet draws air.`,
          { level_ml, least_ml: least },
        ),
      )
    return [...written, ...between]
  },
}

export const jarRules: readonly Rule[] = [q04, q05, q06, q07, q10]

/** Tyre pressures: left against right, and against what tyres carry. */

import { convert, quantity } from '../trial/quantity.ts'
import { above, outside } from './compare.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure } from './text.ts'

const AXLES = [
  { name: 'front', left: 'tyre_p_fl', right: 'tyre_p_fr' },
  { name: 'rear', left: 'tyre_p_rl', right: 'tyre_p_rr' },
] as const
const CELLS = AXLES.flatMap((axle) => [axle.left, axle.right])

const UNIT_WORDS: Record<string, string> = { 'kgf/cm2': 'kgf/cm²' }
const unitWords = (ctx: CheckContext) => {
  const unit = ctx.text('tyre_p_unit')
  return unit === null ? '' : ` ${UNIT_WORDS[unit] ?? unit}`
}

const q27: Rule = {
  id: 'Q27',
  version: 1,
  name: 'tyres left and right',
  severity: ['doubt'],
  cells: CELLS,
  why: 'Unlike pressures pull aside, bias slip and are unsafe [P].',
  check: (ctx) =>
    AXLES.flatMap(({ name, left, right }) => {
      const [l, r] = [ctx.number(left), ctx.number(right)]
      if (l === null || r === null || l + r <= 0) return []
      const off = (200 * Math.abs(l - r)) / (l + r)
      if (!above(off, ctx.limit('tyre_pair_doubt_pct'))) return []
      const unsafe = above(off, ctx.limit('tyre_pair_unsafe_pct'))
      const text = `Tyres ${name}: ${l}${unitWords(ctx)} left, ${r}${unitWords(ctx)} right, ${figure(off, 0)} % apart.${unsafe ? ' Do not drive on: check both cold, by the load table of the maker.' : ''}`
      return [found('doubt', [left, right], text, { [left]: l, [right]: r, ...(unsafe ? { safety: 'tyres' } : {}) })]
    }),
}

/** Least and most a tyre gauge and a farm tyre allow, kPa. */
const HARD_KPA = [35, 420] as const

/** Usual pressures, kPa [P]; the maker's load table goes before them. Without knowing the drive, either front will do. */
function usual(ctx: CheckContext, axle: 'front' | 'rear'): readonly [number, number] {
  const own = ctx.facts.tyreLimits_kpa?.[axle]
  if (own) return own
  if (axle === 'rear') return [80, 180]
  const { drive } = ctx.facts
  return drive === '2WD' ? [150, 300] : drive === '4WD' ? [100, 200] : [100, 300]
}

const PRESSURES = ['psi', 'kPa', 'bar', 'kgf/cm2'] as const

const q28: Rule = {
  id: 'Q28',
  version: 1,
  name: 'tyre pressure',
  severity: ['stop', 'doubt'],
  cells: [...CELLS, 'tyre_p_unit'],
  why: 'By the load table of the maker; wear, safety, or a wrong unit [P].',
  check: (ctx) => {
    const unit = PRESSURES.find((known) => known === ctx.text('tyre_p_unit'))
    if (!unit) return []
    return AXLES.flatMap((axle) =>
      [axle.left, axle.right].flatMap((key): Found[] => {
        const value = ctx.number(key)
        if (value === null) return []
        const kpa = convert(quantity(value, unit), unit, 'kPa')
        const [low, high] = usual(ctx, axle.name)
        const compared = { [key]: value, kpa, low_kpa: low, high_kpa: high }
        const told = `${ctx.label(key)} ${value}${unitWords(ctx)}${unit === 'kPa' ? '' : ` (${figure(kpa, 0)} kPa)`}`
        if (outside(kpa, HARD_KPA[0], HARD_KPA[1]))
          return [
            found(
              'stop',
              [key, 'tyre_p_unit'],
              `${told} lies outside ${HARD_KPA[0]} to ${HARD_KPA[1]} kPa: another unit?`,
              compared,
            ),
          ]
        return outside(kpa, low, high)
          ? [found('doubt', [key], `${told}; ${figure(low, 0)} to ${figure(high, 0)} kPa is usual there.`, compared)]
          : []
      }),
    )
  },
}

export const tyreRules: readonly Rule[] = [q27, q28]

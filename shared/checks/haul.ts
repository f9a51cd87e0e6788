/** What a sheet without a plot asks: the way and the load of transport, and what the PTO drove. */
import { above } from './compare.ts'
import { found, type Rule } from './rule.ts'
import { inside, listed } from './text.ts'

/** Cells a kind of work cannot do without. */
const NEEDED: Readonly<Record<string, { words: string; cells: readonly string[] }>> = {
  transport: { words: 'transport', cells: ['distance_km', 'load_kg', 'trip_count'] },
  pto: { words: 'PTO work', cells: ['worked_kg', 'pto_rpm'] },
}

const l10: Rule = {
  id: 'L10',
  version: 1,
  name: 'work not told',
  severity: ['doubt'],
  cells: ['work_kind', ...Object.values(NEEDED).flatMap(({ cells }) => cells)],
  why: 'Fuel per kilometre or per tonne needs the way and the load [P].',
  check: (ctx) => {
    const needed = NEEDED[ctx.text('work_kind') ?? '']
    const blank = needed?.cells.filter((key) => ctx.readings[key] === null) ?? []
    if (!needed || blank.length === 0) return []
    const names = listed(blank.map((key, i) => (i === 0 ? ctx.label(key) : inside(ctx.label(key)))))
    return [found('doubt', [...blank, 'work_kind'], `${names} left blank beside ${needed.words}.`, { blank: blank.length })]
  },
}

const l11: Rule = {
  id: 'L11',
  version: 1,
  name: 'loaded way longer than the way',
  severity: ['stop'],
  cells: ['distance_km', 'distance_loaded_km'],
  why: 'The way driven loaded is a part of the way driven.',
  check: (ctx) => {
    const [all, loaded] = [ctx.number('distance_km'), ctx.number('distance_loaded_km')]
    if (all === null || loaded === null || !above(loaded, all)) return []
    return [
      found('stop', ['distance_loaded_km', 'distance_km'], `${loaded} km loaded of ${all} km driven: changed over?`, {
        distance_loaded_km: loaded,
        distance_km: all,
      }),
    ]
  },
}

export const haulRules: readonly Rule[] = [l10, l11]

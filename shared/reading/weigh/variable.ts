/** One reading as a variable: its possible values with their ink and their weight before any tie is looked at. */
import { type ChoiceCell, type CombCell, wordsFor } from '../../layouts/layout.ts'
import type { Tie } from '../../layouts/tie.ts'
import type { BoxDist, TickDist } from '../classes.ts'
import { patternsOf } from './patterns.ts'
import { priorOf } from './priors.ts'
import { IMPOSSIBLE_FORMAT } from './thresholds.ts'
import type { Facts, Value } from './types.ts'
import { countOf, countToValue, placesOf } from './values.ts'

export interface Option {
  value: Value
  /** What ties reckon with: last places, minutes, days, the option's place; null for a blank. */
  count: number | null
  ink: number
  /** The least probable of its digits, each in its own box. */
  weakest: number
  /** Ink and what is known of this cell alone. */
  weight: number
}

export interface Variable {
  key: string
  label: string
  mandatory: boolean
  places: number
  options: Option[]
  /** Weight and ink of everything that is not an option: gaps, spoiled boxes, what was left out. */
  otherWeight: number
  gap: number
  /** The alarm for a spoiled box. */
  spoiled: number
}

/** @param boxes distributions in writing order. @param ties those of the layout: marks are looked up in them. */
export function combVariable(cell: CombCell, boxes: ReadonlyArray<BoxDist>, ties: ReadonlyArray<Tie>, facts: Facts): Variable {
  const patterns = patternsOf(boxes, cell.format, cell.kind)
  const places = placesOf(cell.format)
  const prior = priorOf(cell, places, ties, facts)
  const byCount = new Map<number, Option>()
  let impossible = 0
  for (const { digits, ink } of patterns.found) {
    const count = countOf(digits, cell.kind)
    if (count === null) {
      impossible += ink
      continue
    }
    const same = byCount.get(count)
    if (same) {
      same.ink += ink
      continue
    }
    const weakest = Math.min(...digits.map((d, i) => boxes[i]![d < 0 ? 10 : d] ?? 0))
    byCount.set(count, { value: countToValue(count, cell.kind, places), count, ink, weakest, weight: 0 })
  }
  const options = [...byCount.values()]
  for (const option of options) option.weight = option.ink * prior(option.count!)
  const blank: Option = { value: null, count: null, ink: patterns.allBlank, weakest: 1, weight: patterns.allBlank }
  // A gap or a spoiled box says nothing about the value, so it keeps its share beside what the ink reads best.
  const best = options.reduce((top, o) => (o.ink > top.ink ? o : top), blank)
  const scale = best.count === null ? 1 : prior(best.count)
  const other = (patterns.gap + patterns.spoiled + patterns.leftOut) * scale + impossible * IMPOSSIBLE_FORMAT
  return normalised({
    key: cell.key,
    label: wordsFor(cell),
    mandatory: cell.need === 'mandatory',
    places,
    options: [...options, blank],
    otherWeight: other,
    gap: patterns.gap,
    spoiled: patterns.spoiledAlarm,
    inkLess: patterns.gap + patterns.spoiled,
  })
}

/** A choice: exactly one option ticked, or none; two ticked or a spoiled tick is `other`. */
export function choiceVariable(cell: ChoiceCell, ticks: ReadonlyArray<TickDist>): Variable {
  const only = (at: number) => ticks.reduce((all, tick, i) => all * (i === at ? tick.ticked : tick.empty), 1)
  const option = (value: Value, count: number | null, ink: number): Option => ({ value, count, ink, weakest: 1, weight: ink })
  const options = [...cell.options.map((o, i) => option(o.option, i, only(i))), option(null, null, only(-1))]
  const sum = options.reduce((all, o) => all + o.ink, 0)
  const spoiled = 1 - ticks.reduce((all, tick) => all * (1 - tick.spoiled), 1)
  return normalised({
    key: cell.key,
    label: wordsFor(cell),
    mandatory: cell.need === 'mandatory',
    places: 0,
    options,
    otherWeight: Math.max(0, 1 - sum),
    gap: 0,
    spoiled,
    inkLess: spoiled,
  })
}

/** @param inkLess ink that is no option. */
function normalised({ inkLess, ...variable }: Variable & { inkLess: number }): Variable {
  const inkSum = variable.options.reduce((all, o) => all + o.ink, 0) + inkLess
  const weightSum = variable.options.reduce((all, o) => all + o.weight, 0) + variable.otherWeight
  for (const option of variable.options) {
    option.ink /= inkSum
    option.weight /= weightSum
  }
  variable.otherWeight /= weightSum
  variable.options.sort((a, b) => b.weight - a.weight)
  return variable
}

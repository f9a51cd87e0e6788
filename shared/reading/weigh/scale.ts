/** Readings whose unit is ticked: the digits stand for that many of a part of the unit (190 in bar is 1.90). */
import { type CombCell, wordsFor } from '../../layouts/layout.ts'
import type { Weighed } from './types.ts'

/** Without a clear unit the digits stay as written and the reading is in doubt (rule Q16). A blank needs no unit. */
export function scaled(cell: CombCell, reading: Weighed, unit: Weighed | undefined): Weighed {
  if (!cell.scale || reading.value === null) return reading
  const option = unit && typeof unit.value === 'string' ? unit.value : null
  const factor = option === null ? undefined : cell.scale.factors[option]
  const certain = unit?.state === 'clear' && factor !== undefined
  const times = (value: Weighed['value']) => (typeof value === 'number' ? Number((value * (factor ?? 1)).toFixed(6)) : value)
  return {
    ...reading,
    value: times(reading.value),
    candidates: reading.candidates.map((c) => ({ ...c, value: times(c.value) })),
    state: certain ? reading.state : 'in doubt',
    reasons: certain
      ? reading.reasons
      : [
          ...reading.reasons,
          { rule: 'Q16', text: `The unit of ${wordsFor(cell)} is not ticked, or not plainly.`, cells: [cell.key, cell.scale.by] },
        ],
  }
}

/** What is known of a single cell before looking: marks, limits, registers, the calendar. Weights beside the likeliest value. */
import type { CombCell } from '../../layouts/layout.ts'
import type { Tie } from '../../layouts/tie.ts'
import { BROKEN_MARK, HALF_MARK, IMPOSSIBLE, UNKNOWN_NUMBER, UNLIKELY } from './thresholds.ts'
import type { Facts } from './types.ts'
import { dayCount } from './values.ts'

type Prior = (count: number) => number
type Marks = Extract<Tie, { kind: 'marks' }>

const USUAL_DAYS_LATE = 30

export function priorOf(cell: CombCell, places: number, ties: ReadonlyArray<Tie>, facts: Facts): Prior {
  const parts: Prior[] = []
  const marks = ties.find((tie): tie is Marks => tie.kind === 'marks' && tie.keys.includes(cell.key))
  if (marks) parts.push(marksPrior(marks, places))
  if (cell.kind === 'digits') parts.push(limitsPrior(cell, places))
  if (cell.kind === 'date' && facts.today) parts.push(datePrior(dayCount(facts.today)))
  const known = cell.register ? facts.known?.[cell.register] : undefined
  if (known && known.size > 0) parts.push((count) => (known.has(count) ? 1 : UNKNOWN_NUMBER / known.size))
  return (count) => parts.reduce((all, part) => all * part(count), 1)
}

/** Weights such that the shares of readings on marks, on half marks and on neither come out as the constants say. */
function marksPrior(marks: Marks, places: number): Prior {
  const unit = 10 ** places
  const step = Math.round(marks.step * unit)
  const half = marks.half === undefined ? step : Math.round(marks.half * unit)
  const onHalf = half === step ? 0 : HALF_MARK
  const onMark = 1 - onHalf - BROKEN_MARK
  // Of `step` neighbouring counts one is a mark, step / half - 1 are half marks, the others neither.
  const halves = step / half - 1
  const neither = Math.max(1, step - 1 - halves)
  return (count) => {
    if (count % step === 0) return 1
    if (count % half === 0) return onHalf / halves / onMark
    return BROKEN_MARK / neither / onMark
  }
}

/** Limits of scaled cells are in units that the digits alone do not tell, so they are left to the rules. */
function limitsPrior(cell: CombCell, places: number): Prior {
  const unit = 10 ** places
  const within = (limits: readonly [number, number] | undefined, count: number) =>
    !limits || (count >= limits[0] * unit - 1e-6 && count <= limits[1] * unit + 1e-6)
  if (cell.scale) return () => 1
  return (count) => (within(cell.hard, count) ? (within(cell.plausible, count) ? 1 : UNLIKELY) : IMPOSSIBLE)
}

const datePrior =
  (today: number): Prior =>
  (count) =>
    count > today ? IMPOSSIBLE : today - count <= USUAL_DAYS_LATE ? 1 : UNLIKELY

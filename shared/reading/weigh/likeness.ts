/** Readings of like things lie near each other: how much less likely they are apart, and what repeats say of one among them. */
import type { Tie } from '../../layouts/tie.ts'
import { APART, SURE_NEIGHBOUR } from './thresholds.ts'
import type { Option, Variable } from './variable.ts'

type Window = { share?: number; amount?: number }

/** Nearly all like readings lie within the window: it spans this many standard deviations. */
const WINDOW_SPANS = 2.5
/** Student's t with four degrees of freedom: people's repeats have wider tails than a bell's. */
const FREEDOM = 4

/** Weight of `value` where one like it is `other`: 1 for the same, falling with their distance, and never to nothing. */
export function likeness(value: number, other: number, { share = 0, amount }: Window): number {
  const window = amount ?? share * Math.max(Math.abs(value), Math.abs(other))
  if (window <= 0) return value === other ? 1 : APART
  const off = ((value - other) / window) * WINDOW_SPANS
  return Math.max(APART / 10, (1 + (off * off) / FREEDOM) ** (-(FREEDOM + 1) / 2))
}

/** Needed for a median that one odd reading cannot pull away. */
const ENOUGH = 3

/**
 * Weighs each of a row of repeats by the median of those others that are sure alone. A prior within the reading, not a tie: what
 * the repeats say is never passed on, so it closes no ring and proves nothing.
 */
export function weighRepeats(variables: readonly Variable[], ties: ReadonlyArray<Tie>): void {
  const byKey = new Map(variables.map((v) => [v.key, v]))
  for (const tie of ties) {
    if (tie.kind !== 'alike') continue
    const own = tie.keys.flatMap((key) => byKey.get(key) ?? [])
    const counts = own.map(sureCount)
    own.forEach((variable, i) => {
      const others = counts.filter((count, k): count is number => k !== i && count !== null).sort((a, b) => a - b)
      if (others.length < Math.min(ENOUGH, tie.keys.length - 1)) return
      const unit = 10 ** variable.places
      const middle = others[others.length >> 1]! / unit
      reweigh(variable, (count) => likeness(count / unit, middle, tie))
    })
  }
}

function sureCount({ options }: Variable): number | null {
  const best = options[0]
  return best && best.weight >= SURE_NEIGHBOUR ? best.count : null
}

/** Brings in a prior; what is no option keeps its share beside what the ink reads best. */
function reweigh(variable: Variable, prior: (count: number) => number): void {
  const of = ({ count }: Option) => (count === null ? 1 : prior(count))
  const inkBest = variable.options.reduce((top, o) => (o.ink > top.ink ? o : top))
  variable.otherWeight *= of(inkBest)
  for (const option of variable.options) option.weight *= of(option)
  const sum = variable.options.reduce((all, o) => all + o.weight, 0) + variable.otherWeight
  for (const option of variable.options) option.weight /= sum
  variable.otherWeight /= sum
  variable.options.sort((a, b) => b.weight - a.weight)
}

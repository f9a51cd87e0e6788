/** Readings of like things lie near each other: how much less likely they are apart, and what others lead one to expect. */
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
  return Math.max(APART, (1 + (off * off) / FREEDOM) ** (-(FREEDOM + 1) / 2))
}

/** Needed for a median that one odd reading cannot pull away. */
const ENOUGH = 3

/**
 * Weighs readings by what those around them that are sure alone lead one to expect: repeats by the middle of the others, a quotient
 * by its parts. Priors within the reading, not ties: what they say is never passed on, so they close no ring and prove nothing.
 */
export function weighByNeighbours(variables: readonly Variable[], ties: ReadonlyArray<Tie>): void {
  const byKey = new Map(variables.map((v) => [v.key, v]))
  // All are looked at before any is weighed, so that none speaks for itself by way of another.
  const sure = new Map(variables.map((v) => [v.key, sureValue(v)]))
  const sureAmong = (keys: readonly string[]) => keys.flatMap((key) => sure.get(key) ?? []).sort((a, b) => a - b)
  const expect = (key: string, value: number, window: Window) => {
    const variable = byKey.get(key)
    if (variable) reweigh(variable, value, window)
  }
  for (const tie of ties) {
    if (tie.kind === 'alike') {
      for (const key of tie.keys) {
        const others = sureAmong(tie.keys.filter((other) => other !== key))
        if (others.length >= Math.min(ENOUGH, tie.keys.length - 1)) expect(key, others[others.length >> 1]!, tie)
      }
    } else if (tie.kind === 'quotient') {
      const [product, by] = [sure.get(tie.product), sure.get(tie.by)]
      if (product && by) expect(tie.key, product / by, tie)
    }
  }
}

function sureValue({ options, places }: Variable): number | null {
  const best = options[0]
  return best && best.count !== null && best.weight >= SURE_NEIGHBOUR ? best.count / 10 ** places : null
}

/** Brings in a prior; what is no option keeps its share beside what the ink reads best. */
function reweigh(variable: Variable, expected: number, window: Window): void {
  const of = ({ count }: Option) => (count === null ? 1 : likeness(count / 10 ** variable.places, expected, window))
  const inkBest = variable.options.reduce((top, o) => (o.ink > top.ink ? o : top))
  variable.otherWeight *= of(inkBest)
  for (const option of variable.options) option.weight *= of(option)
  const sum = variable.options.reduce((all, o) => all + o.weight, 0) + variable.otherWeight
  for (const option of variable.options) option.weight /= sum
  variable.otherWeight /= sum
  variable.options.sort((a, b) => b.weight - a.weight)
}

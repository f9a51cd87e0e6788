/** Every pair of treatments by the model's pooled error. */
import type { Analysis, Pair } from '../schemas/comparison.ts'
import { tBeyond, tCritical } from './distributions.ts'
import type { Fit } from './fit.ts'
import { holm } from './holm.ts'
import { ALPHA } from './observations.ts'
import { studentizedRangeAbove, studentizedRangeCritical } from './studentized-range.ts'

/** t, Tukey (Kramer's form where sizes differ) and Holm for all pairs, in order of first appearance. */
export function comparePairs(fit: Fit): Pair[] {
  const k = fit.treatments.length
  const t05 = tCritical(ALPHA, fit.df)
  const q05 = studentizedRangeCritical(ALPHA, k, fit.df) / Math.SQRT2
  const pairs = fit.treatments.flatMap((first, i) =>
    fit.treatments.slice(i + 1).map((second, offset) => {
      const j = i + 1 + offset
      const difference = fit.difference(i, j)
      const se = Math.sqrt(fit.ms * fit.factor(i, j))
      const t = difference / se
      const around = (critical: number): Pair['interval'] => [difference - critical * se, difference + critical * se]
      const pTukey = studentizedRangeAbove(Math.abs(t) * Math.SQRT2, k, fit.df)
      const p = tBeyond(t, fit.df)
      return { first, second, difference, se, t, df: fit.df, p, pTukey, interval: around(t05), tukeyInterval: around(q05) }
    }),
  )
  const stepped = holm(pairs.map((pair) => pair.p))
  return pairs.map((pair, i) => ({ ...pair, pHolm: stepped[i]! }))
}

/** One difference for all pairs, where all have the same error; the least significant one only where F is significant. */
export function leastDifferences(fit: Fit, pairs: readonly Pair[]): Pick<Analysis, 'lsd' | 'hsd'> {
  const se = pairs[0]!.se
  if (pairs.some((pair) => Math.abs(pair.se - se) > 1e-9 * se)) return { lsd: null, hsd: null }
  const significant = (fit.squares[0]?.p ?? 1) < ALPHA
  return {
    lsd: significant ? tCritical(ALPHA, fit.df) * se : null,
    hsd: (studentizedRangeCritical(ALPHA, fit.treatments.length, fit.df) / Math.SQRT2) * se,
  }
}

/** How many pairs, blocks or runs it takes to see a gap. */
import type { Analysis, Needed } from '../schemas/comparison.ts'
import { tCritical } from './distributions.ts'
import { meanOverSpread, normalBelow } from './normal.ts'
import { ALPHA } from './observations.ts'

export const POWER = 0.8
export const METHOD = 'noncentral t, both tails, by integration over the spread; smallest whole number tried upwards'
const MOST = 1000

/** P(|T| > critical) where the true gap is `shift` standard errors: both tails of the noncentral t. */
export function tPower(shift: number, df: number, alpha = ALPHA): number {
  const critical = tCritical(alpha, df)
  return meanOverSpread(df, (s) => normalBelow(shift - critical * s) + normalBelow(-shift - critical * s))
}

type Unit = Analysis['replicates']['unit']

/** Degrees of freedom and standard error of a gap (in standard deviations) with n of the unit. */
function designWith(n: number, unit: Unit, treatments: number): { df: number; se: number } {
  if (unit === 'pairs') return { df: n - 1, se: Math.sqrt(1 / n) }
  const df = unit === 'blocks' ? (n - 1) * (treatments - 1) : treatments * (n - 1)
  return { df, se: Math.sqrt(2 / n) }
}

/**
 * The least n that shows a gap with the wanted power at the two-sided level α of a single comparison. `sd` is that of the gaps
 * within pairs, else the model's residual one, in the unit of `gap`. Null beyond 1000.
 */
export function neededFor(gap: number, sd: number, unit: Unit, treatments: number): Needed {
  if (!(gap > 0 && sd > 0)) return { gap, n: null }
  for (let n = 2; n <= MOST; n++) {
    const { df, se } = designWith(n, unit, treatments)
    if (tPower(gap / (sd * se), df) >= POWER) return { gap, n }
  }
  return { gap, n: null }
}

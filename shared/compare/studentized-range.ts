/**
 * The studentized range: the widest gap among k means, in standard errors (Tukey). Own code by plain integration:
 * @stdlib/stats-base-dists-studentized-range-cdf 0.2.3 gives no number for 1 degree of freedom, is off by up to 0.0009 for 2
 * and 0.0001 for 3 (distributions.test.ts); this holds 10 decimals against SciPy's reference values.
 */
import { meanOverSpread, normalBelow, normalDensity } from './normal.ts'

const STEP = 0.125
const REACH = 8
/** Places on the normal curve where the largest of the k values may stand. */
const PLACES = Array.from({ length: (2 * REACH) / STEP + 1 }, (_, i) => {
  const z = -REACH + i * STEP
  return { z, weight: STEP * normalDensity(z), below: normalBelow(z) }
})

/** P(range of k normal values > w): the largest stands at z, the others within w below it. */
function rangeAbove(w: number, k: number): number {
  let within = 0
  for (const { z, weight, below } of PLACES) within += weight * (below - normalBelow(z - w)) ** (k - 1)
  return Math.max(0, 1 - k * within)
}

/** P(Q > q) for k means (2 or more) with df degrees of freedom of their error. */
export function studentizedRangeAbove(q: number, k: number, df: number): number {
  if (!(k >= 2 && df > 0)) throw new RangeError('a range needs two means and degrees of freedom')
  if (q <= 0) return 1
  return Math.min(
    1,
    meanOverSpread(df, (s) => rangeAbove(q * s, k)),
  )
}

/** The q that leaves the share `alpha` (0 to 1) above it. */
export function studentizedRangeCritical(alpha: number, k: number, df: number): number {
  if (!(alpha > 0 && alpha < 1)) throw new RangeError('a level lies between 0 and 1')
  const excess = (q: number) => studentizedRangeAbove(q, k, df) - alpha
  let [low, high] = [0, 4]
  let [over, under] = [1 - alpha, excess(high)]
  while (under > 0) {
    ;[low, over] = [high, under]
    high *= 2
    under = excess(high)
  }
  // False position with the stale end's weight halved (Illinois): ten steps where halving takes forty.
  for (let kept = 0, i = 0; i < 100 && high - low > 1e-10 * high; i++) {
    const q = high - (under * (high - low)) / (under - over)
    const at = excess(q)
    if (Math.abs(at) < 1e-14) return q
    if (at > 0) {
      ;[low, over] = [q, at]
      if (kept > 0) under /= 2
      kept = 1
    } else {
      ;[high, under] = [q, at]
      if (kept < 0) over /= 2
      kept = -1
    }
  }
  return (low + high) / 2
}

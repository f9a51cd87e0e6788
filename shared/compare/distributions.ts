/** Tails and quantiles of t and F. The library passes the reference values to 12 digits once it is asked for lower tails only. */
import fBelow from '@stdlib/stats-base-dists-f-cdf'
import tBelow from '@stdlib/stats-base-dists-t-cdf'
import tQuantile from '@stdlib/stats-base-dists-t-quantile'

/** P(|T| > |t|). */
export const tBeyond = (t: number, df: number): number => 2 * tBelow(-Math.abs(t), df)

/** The t that leaves alpha outside ±t. */
export const tCritical = (alpha: number, df: number): number => -tQuantile(alpha / 2, df)

/** P(F > f): the lower tail of 1/F with the degrees of freedom exchanged, which keeps the digits of small p. */
export const fAbove = (f: number, df1: number, df2: number): number => (f > 0 ? fBelow(1 / f, df2, df1) : 1)

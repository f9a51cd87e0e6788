/** Plain statistics of repeated readings (C10). Checked against the NIST StRD univariate sets in stats.test.ts. */

/** Mean by two passes: the second takes the rounding of the first out. @throws RangeError on an empty list. */
export function mean(values: readonly number[]): number {
  if (values.length === 0) throw new RangeError('a mean needs at least one value')
  const first = values.reduce((sum, x) => sum + x, 0) / values.length
  return first + values.reduce((sum, x) => sum + (x - first), 0) / values.length
}

/** Standard deviation with n − 1; 0 for a single value would claim certainty, so it is null. */
export function standardDeviation(values: readonly number[]): number | null {
  if (values.length < 2) return null
  const centre = mean(values)
  let squares = 0
  let rest = 0
  for (const x of values) {
    squares += (x - centre) ** 2
    rest += x - centre
  }
  // The correction by the rest keeps the digits of long lists far from zero.
  return Math.sqrt((squares - rest ** 2 / values.length) / (values.length - 1))
}

/** Coefficient of variation, % of the mean; null with fewer than two values or a mean of 0. */
export function variation_pct(values: readonly number[]): number | null {
  const s = standardDeviation(values)
  if (s === null) return null
  const centre = mean(values)
  return centre === 0 ? null : (100 * s) / centre
}

/** Standard uncertainty of a mean from its own scatter (type A, JCGM 100 4.2.3): s/√n. */
export function typeA(values: readonly number[]): number | null {
  const s = standardDeviation(values)
  return s === null ? null : s / Math.sqrt(values.length)
}

/** Middle value. @throws RangeError on an empty list. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  const upper = sorted[Math.floor(sorted.length / 2)]
  const lower = sorted[Math.floor((sorted.length - 1) / 2)]
  if (upper === undefined || lower === undefined) throw new RangeError('a median needs at least one value')
  return (lower + upper) / 2
}

/** Median of the absolute distances from the median: not moved by a few wild values. */
export function medianDeviation(values: readonly number[]): number {
  const centre = median(values)
  return median(values.map((x) => Math.abs(x - centre)))
}

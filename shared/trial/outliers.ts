/** A value far from its like. Shown, never dropped in silence. */
import { mean, median, medianDeviation, standardDeviation } from './stats.ts'
import { quantileAbove } from './student.ts'

/** Largest distance from the mean that n values of one kind show at that risk, in standard deviations (two-sided; NIST e-Handbook 1.3.5.17.1). */
export function grubbsCritical(n: number, alpha: number): number {
  if (n < 3) throw new RangeError('Grubbs needs at least three values')
  const t = quantileAbove(alpha / (2 * n), n - 2)
  return ((n - 1) / Math.sqrt(n)) * Math.sqrt(t ** 2 / (n - 2 + t ** 2))
}

/** |x − mean| / s of one of the values; null where they do not spread. */
export function grubbsDistance(x: number, values: readonly number[]): number | null {
  const s = standardDeviation(values)
  return s === null || s === 0 ? null : Math.abs(x - mean(values)) / s
}

/** Robust z of one of the values (Iglewicz and Hoaglin, from memory): not masked by two wild ones; null where half of them are equal. */
export function robustZ(x: number, values: readonly number[]): number | null {
  const deviation = medianDeviation(values)
  return deviation === 0 ? null : (0.6745 * (x - median(values))) / deviation
}

/** Intervals for proportions: exact for single readings, and by drawing whole sheets again where readings of a sheet hang together. */
import { chanceOf } from '../simulator/random.ts'

/** Logarithm of the gamma function for x > 0 (Lanczos, g = 7; error under 1e-13 here). */
function logGamma(x: number): number {
  const c = [
    0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059, 12.507343278686905,
    -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
  ]
  const y = x - 1
  let sum = c[0]!
  for (let i = 1; i < c.length; i += 1) sum += c[i]! / (y + i)
  const t = y + 7.5
  return 0.5 * Math.log(2 * Math.PI) + (y + 0.5) * Math.log(t) - t + Math.log(sum)
}

/** Continued fraction of the incomplete beta function, by the modified method of Lentz. */
function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300
  let c = 1
  let d = 1 - ((a + b) * x) / (a + 1)
  d = 1 / (Math.abs(d) < tiny ? tiny : d)
  let value = d
  for (let m = 1; m <= 500; m += 1) {
    for (const term of [
      (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m)),
      (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1)),
    ]) {
      d = 1 + term * d
      c = 1 + term / c
      d = 1 / (Math.abs(d) < tiny ? tiny : d)
      c = Math.abs(c) < tiny ? tiny : c
      value *= d * c
    }
    if (Math.abs(d * c - 1) < 1e-15) break
  }
  return value
}

/** Regularised incomplete beta function I_x(a, b). */
function betaShare(x: number, a: number, b: number): number {
  if (x <= 0) return 0
  if (x >= 1) return 1
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x))
  return x < (a + 1) / (a + b + 2) ? (front * betaFraction(x, a, b)) / a : 1 - (front * betaFraction(1 - x, b, a)) / b
}

function betaQuantile(p: number, a: number, b: number): number {
  let [low, high] = [0, 1]
  for (let i = 0; i < 200 && high - low > 1e-15; i += 1) {
    const middle = (low + high) / 2
    if (betaShare(middle, a, b) < p) low = middle
    else high = middle
  }
  return (low + high) / 2
}

export interface Interval {
  low: number
  high: number
}

/** Clopper-Pearson interval of `hits` of `count`, two-sided; nothing counted says nothing: 0 to 1. */
export function exactInterval(hits: number, count: number, confidence = 0.95): Interval {
  const tail = (1 - confidence) / 2
  return {
    low: hits <= 0 ? 0 : betaQuantile(tail, hits, count - hits + 1),
    high: hits >= count ? 1 : betaQuantile(1 - tail, hits + 1, count - hits),
  }
}

/** Hits and count of one sheet. */
export type SheetShare = readonly [hits: number, count: number]

/** Percentile interval of the pooled share, whole sheets drawn again 2,000 times with a fixed seed. */
export function bootstrapBySheet(sheets: readonly SheetShare[], confidence = 0.95): Interval {
  const counted = sheets.filter(([, count]) => count > 0)
  if (counted.length === 0) return { low: 0, high: 1 }
  const chance = chanceOf('bootstrap')
  const shares = Array.from({ length: 2000 }, () => {
    let [hits, count] = [0, 0]
    for (let i = 0; i < counted.length; i += 1) {
      const sheet = counted[chance.whole(0, counted.length - 1)]!
      hits += sheet[0]
      count += sheet[1]
    }
    return hits / count
  }).sort((a, b) => a - b)
  const tail = (1 - confidence) / 2
  return { low: quantile(shares, tail), high: quantile(shares, 1 - tail) }
}

/** Quantile of sorted numbers, between neighbours in proportion. NaN of none. */
export function quantile(sorted: readonly number[], p: number): number {
  if (sorted.length === 0) return Number.NaN
  const at = p * (sorted.length - 1)
  const i = Math.floor(at)
  const next = sorted[Math.min(i + 1, sorted.length - 1)]!
  return sorted[i]! + (at - i) * (next - sorted[i]!)
}

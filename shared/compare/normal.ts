/** The normal distribution, and means over the spread a small sample shows. Checked in distributions.test.ts. */

const DENSITY_AT_0 = 1 / Math.sqrt(2 * Math.PI)
export const normalDensity = (x: number): number => DENSITY_AT_0 * Math.exp((-x * x) / 2)

/** P(Z < x), by the series Φ = ½ + φ(x)·(x + x³/3 + x⁵/15 + …): 15 decimals within ±8, beyond which it is 0 or 1 to 15 decimals. */
export function normalBelow(x: number): number {
  if (x < -8) return 0
  if (x > 8) return 1
  let term = x
  let sum = x
  for (let k = 3; Math.abs(term) > 1e-17 * Math.abs(sum); k += 2) {
    term *= (x * x) / k
    sum += term
  }
  return 0.5 + sum * normalDensity(x)
}

/**
 * Mean of g(S), S = √(χ²/df): what a standard deviation estimated with df degrees of freedom does to anything measured in it.
 * Trapezoids in ln S, which converge exponentially for such integrands; the weights are scaled to 1 by their own sum.
 */
export function meanOverSpread(df: number, g: (s: number) => number): number {
  const width = 1 / Math.sqrt(2 * df)
  const step = Math.min(0.125, 0.6 * width)
  const from = -Math.max(9 * width, 40 / df)
  let sum = 0
  let weights = 0
  for (let x = from; x < 9 * width; x += step) {
    const weight = Math.exp(df * (x + 0.5 - Math.exp(2 * x) / 2))
    weights += weight
    sum += weight * g(Math.exp(x))
  }
  return sum / weights
}

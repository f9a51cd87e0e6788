/** Treatments on unlike fields: one-way analysis of variance, and Welch's tests, which let the spreads differ. */
import { UserError } from '../errors.ts'
import type { Analysis, TTest } from '../schemas/comparison.ts'
import { mean, standardDeviation } from '../trial/stats.ts'
import { fAbove, tBeyond, tCritical } from './distributions.ts'
import { type Fit, needSpread, squareOf, squaresTable, sumOf } from './fit.ts'
import { ALPHA, byTreatment, type Observation, valuesOf } from './observations.ts'

/**
 * Classical one-way model. Squares are summed over deviations from means, never as differences of large sums: NIST's sets with
 * nine leading digits in common keep the digits their data have (nist.test.ts).
 * @throws UserError `not_accepted` with one treatment, or no spread
 */
export function fitOneFactor(observations: readonly Observation[], names: { treatment: string }): Fit {
  const groups = byTreatment(observations)
  const treatments = [...groups.keys()]
  if (treatments.length < 2) throw new UserError('not_accepted', `A comparison needs two of ${names.treatment}; there is one.`)
  // Measured from the first value: what all values share does not use up digits.
  const origin = observations[0]!.value
  const lists = [...groups.values()].map((group) => valuesOf(group).map((x) => x - origin))
  const means = lists.map(mean)
  const grand = mean(lists.flat())
  const between = sumOf(lists.map((list, i) => list.length * squareOf(means[i]! - grand)))
  const within = sumOf(lists.map((list, i) => sumOf(list.map((x) => squareOf(x - means[i]!)))))
  const df = observations.length - treatments.length
  needSpread(within, df, between + within)
  return {
    treatments,
    difference: (i, j) => means[i]! - means[j]!,
    factor: (i, j) => 1 / lists[i]!.length + 1 / lists[j]!.length,
    ms: within / df,
    df,
    squares: squaresTable([
      { source: names.treatment, df: treatments.length - 1, ss: between },
      { source: 'residual', df, ss: within },
    ]),
    rSquared: between / (between + within),
  }
}

interface Spread {
  n: number
  mean: number
  /** Variance of the mean. */
  v: number
}

/** Welch's F (B. L. Welch, Biometrika 1951); null unless every treatment shows a spread. */
export function welchF(observations: readonly Observation[]): Analysis['welchF'] {
  const groups = spreads(observations)
  if (!groups) return null
  const k = groups.length
  const weights = groups.map((g) => 1 / g.v)
  const total = sumOf(weights)
  const centre = sumOf(groups.map((g, i) => weights[i]! * g.mean)) / total
  const lack = sumOf(groups.map((g, i) => squareOf(1 - weights[i]! / total) / (g.n - 1)))
  const between = sumOf(groups.map((g, i) => weights[i]! * squareOf(g.mean - centre))) / (k - 1)
  const f = between / (1 + (2 * (k - 2) * lack) / (k * k - 1))
  const df2 = (k * k - 1) / (3 * lack)
  return { f, df1: k - 1, df2, p: fAbove(f, k - 1, df2) }
}

/** Welch's and the pooled t of two treatments; none where one of them is a single run. */
export function twoSampleTests(observations: readonly Observation[], fit: Fit): TTest[] {
  const [first, second] = fit.treatments
  if (fit.treatments.length !== 2 || first === undefined || second === undefined) return []
  const difference = fit.difference(0, 1)
  const test = (method: TTest['method'], se: number, df: number, sd: number | null): TTest => {
    const t = difference / se
    const half = tCritical(ALPHA, df) * se
    const interval: TTest['interval'] = [difference - half, difference + half]
    return { method, first, second, n: observations.length, difference, sd, se, t, df, p: tBeyond(t, df), interval }
  }
  const pooled = test('pooled t', Math.sqrt(fit.ms * fit.factor(0, 1)), fit.df, Math.sqrt(fit.ms))
  const groups = spreads(observations)
  if (!groups) return [pooled]
  const [a, b] = groups as [Spread, Spread]
  const df = squareOf(a.v + b.v) / (squareOf(a.v) / (a.n - 1) + squareOf(b.v) / (b.n - 1))
  return [test('Welch t', Math.sqrt(a.v + b.v), df, null), pooled]
}

/** Null where a treatment shows no spread of its own: Welch's tests weigh by it. */
function spreads(observations: readonly Observation[]): Spread[] | null {
  const origin = observations[0]!.value
  const found: Spread[] = []
  for (const group of byTreatment(observations).values()) {
    const values = valuesOf(group).map((x) => x - origin)
    const s = standardDeviation(values)
    if (s === null || s === 0) return null
    found.push({ n: values.length, mean: mean(values), v: (s * s) / values.length })
  }
  return found
}

/** Two treatments side by side on the same plots: the gaps within pairs are what is judged. */
import { UserError } from '../errors.ts'
import type { LeftOut, TTest } from '../schemas/comparison.ts'
import { mean, standardDeviation } from '../trial/stats.ts'
import { tBeyond, tCritical } from './distributions.ts'
import { ALPHA, groupedBy, inOrder, type Observation } from './observations.ts'

export interface Pairs {
  test: TTest
  /** The observations that found their partner. */
  kept: Observation[]
  leftOut: LeftOut[]
}

/**
 * Paired t of first − second. A run without a partner is listed and left out.
 * @throws UserError `not_accepted` unless there are two treatments, two whole pairs, and gaps that differ; and where a pair
 *   holds a treatment twice
 */
export function pairedTest(observations: readonly Observation[], names: { treatment: string; block: string }): Pairs {
  const treatments = inOrder(observations.map((o) => o.treatment))
  const [first, second] = treatments
  if (treatments.length !== 2 || first === undefined || second === undefined)
    throw new UserError(
      'not_accepted',
      `A paired comparison needs two of ${names.treatment}; there are ${treatments.length}: ${treatments.join(', ')}. Compare in blocks instead.`,
    )
  const gaps: number[] = []
  const kept: Observation[] = []
  const leftOut: LeftOut[] = []
  for (const [pair, members] of groupedBy(observations, (o) => o.block ?? '')) {
    const of = (treatment: string) => {
      const found = members.filter((o) => o.treatment === treatment)
      if (found.length > 1)
        throw new UserError(
          'not_accepted',
          `${names.block} ${pair} holds ${found.length} values of ${treatment}; a pair is one of each. Compare in blocks, which takes several.`,
        )
      return found[0]
    }
    const [a, b] = [of(first), of(second)]
    if (a && b) {
      gaps.push(a.value - b.value)
      kept.push(a, b)
    } else {
      const missing = a ? second : first
      leftOut.push(...members.map((o) => ({ id: o.id, reason: `${names.block} ${pair} has no ${missing} to pair with` })))
    }
  }
  if (gaps.length < 2)
    throw new UserError(
      'not_accepted',
      `A paired comparison needs two whole pairs; there ${gaps.length === 1 ? 'is one' : 'is none'}.`,
    )
  const difference = mean(gaps)
  const sd = standardDeviation(gaps)!
  if (!(sd > 1e-12 * Math.abs(difference)))
    throw new UserError('not_accepted', 'All pairs show the same gap: there is no spread to judge it by.')
  const df = gaps.length - 1
  const se = sd / Math.sqrt(gaps.length)
  const t = difference / se
  const half = tCritical(ALPHA, df) * se
  const interval: TTest['interval'] = [difference - half, difference + half]
  const test: TTest = {
    method: 'paired t',
    first,
    second,
    n: gaps.length,
    difference,
    sd,
    se,
    t,
    df,
    p: tBeyond(t, df),
    interval,
  }
  return { test, kept, leftOut }
}

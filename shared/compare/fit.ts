/** What a model leaves behind for comparing its treatments pairwise. */
import { UserError } from '../errors.ts'
import type { SquaresRow } from '../schemas/comparison.ts'
import { fAbove } from './distributions.ts'

export interface Fit {
  /** In order of first appearance. */
  treatments: string[]
  /** first − second, in places of `treatments`. */
  difference(i: number, j: number): number
  /** Variance of that difference in units of the error variance: 1/nᵢ + 1/nⱼ in the plain case. */
  factor(i: number, j: number): number
  /** The pooled error: mean square and its degrees of freedom. */
  ms: number
  df: number
  squares: SquaresRow[]
  rSquared: number
}

export const squareOf = (x: number): number => x * x
export const sumOf = (values: readonly number[]): number => values.reduce((sum, x) => sum + x, 0)

/** The table of squares: each source is tested against the last, the error. */
export function squaresTable(sources: ReadonlyArray<{ source: string; df: number; ss: number }>): SquaresRow[] {
  const error = sources.at(-1)!
  const errorMs = error.ss / error.df
  return sources.map(({ source, df, ss }) => {
    if (source === error.source) return { source, df, ss, ms: errorMs, f: null, p: null }
    const f = ss / df / errorMs
    return { source, df, ss, ms: ss / df, f, p: fAbove(f, df, error.df) }
  })
}

/** @throws UserError `not_accepted` where no spread is left to judge a gap by */
export function needSpread(ss: number, df: number, total: number): void {
  if (df < 1)
    throw new UserError('not_accepted', 'There are too few values to judge a gap: none is left over to show how runs differ.')
  if (!(ss > 1e-25 * total))
    throw new UserError('not_accepted', 'The values show no spread of their own, so there is nothing to judge a gap by.')
}

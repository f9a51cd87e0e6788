/**
 * Treatments on blocks: y = μ + treatment + block + e by least squares. Cells may hold several values or none; each source is
 * then what it adds to the other (marginal), which for whole blocks is the usual table.
 */
import { UserError } from '../errors.ts'
import { mean } from '../trial/stats.ts'
import { type Fit, needSpread, squareOf, squaresTable, sumOf } from './fit.ts'
import { invert } from './invert.ts'
import { inOrder, type Observation } from './observations.ts'

interface Placed {
  t: number
  b: number
  y: number
}

const meansBy = (rows: readonly Placed[], count: number, of: (row: Placed) => number, y: (row: Placed) => number): number[] =>
  Array.from({ length: count }, (_, i) => mean(rows.filter((row) => of(row) === i).map(y)))

/** @throws UserError `not_accepted` where treatments never meet, or nothing is left over for the error */
export function fitBlocks(observations: readonly Observation[], names: { treatment: string; block: string }): Fit {
  const treatments = inOrder(observations.map((o) => o.treatment))
  const blocks = inOrder(observations.map((o) => o.block ?? ''))
  if (treatments.length < 2) throw new UserError('not_accepted', `A comparison needs two of ${names.treatment}; there is one.`)
  if (blocks.length < 2) throw new UserError('not_accepted', `Blocks need two of ${names.block}; there is one.`)
  const origin = observations[0]!.value
  const rows = observations.map((o) => ({
    t: treatments.indexOf(o.treatment),
    b: blocks.indexOf(o.block ?? ''),
    y: o.value - origin,
  }))
  const spread = treatmentSpread(rows, treatments.length, blocks.length)
  if (!spread)
    throw new UserError(
      'not_accepted',
      `Some of ${names.treatment} never meet in one ${names.block}, not even through others: nothing links them.`,
    )

  const blockMeans = meansBy(
    rows,
    blocks.length,
    (r) => r.b,
    (r) => r.y,
  )
  const treatmentMeans = meansBy(
    rows,
    treatments.length,
    (r) => r.t,
    (r) => r.y,
  )
  // What each treatment shows over the means of the blocks it stood in; solved for effects, the last one at zero.
  const over = treatments.map((_, i) => sumOf(rows.filter((r) => r.t === i).map((r) => r.y - blockMeans[r.b]!)))
  const effects = treatments.map((_, i) => sumOf(over.slice(0, -1).map((x, j) => spread(i, j) * x)))
  const bases = meansBy(
    rows,
    blocks.length,
    (r) => r.b,
    (r) => r.y - effects[r.t]!,
  )
  const fitted = rows.map((r) => bases[r.b]! + effects[r.t]!)

  const error = sumOf(rows.map((r, i) => squareOf(r.y - fitted[i]!)))
  const byTreatment = sumOf(rows.map((r, i) => squareOf(fitted[i]! - blockMeans[r.b]!)))
  const byBlock = sumOf(rows.map((r, i) => squareOf(fitted[i]! - treatmentMeans[r.t]!)))
  const grand = mean(rows.map((r) => r.y))
  const total = sumOf(rows.map((r) => squareOf(r.y - grand)))
  const df = rows.length - treatments.length - blocks.length + 1
  needSpread(error, df, total)
  return {
    treatments,
    difference: (i, j) => effects[i]! - effects[j]!,
    factor: (i, j) => spread(i, i) + spread(j, j) - 2 * spread(i, j),
    ms: error / df,
    df,
    squares: squaresTable([
      { source: names.treatment, df: treatments.length - 1, ss: byTreatment },
      { source: names.block, df: blocks.length - 1, ss: byBlock },
      { source: 'residual', df, ss: error },
    ]),
    rSquared: 1 - error / total,
  }
}

/**
 * Covariance of the effects in units of the error variance: the inverse of the treatments' normal equations once the blocks are
 * taken out, the last treatment at zero. Null where treatments are not linked through blocks.
 */
function treatmentSpread(rows: readonly Placed[], k: number, b: number): ((i: number, j: number) => number) | null {
  const cells = Array.from({ length: k }, () => new Array<number>(b).fill(0))
  for (const row of rows) cells[row.t]![row.b]! += 1
  const blockSizes = Array.from({ length: b }, (_, i) => sumOf(cells.map((row) => row[i]!)))
  const equations = Array.from({ length: k - 1 }, (_, i) =>
    Array.from({ length: k - 1 }, (_, j) => {
      const shared = sumOf(blockSizes.map((size, c) => (cells[i]![c]! * cells[j]![c]!) / size))
      return (i === j ? sumOf(cells[i]!) : 0) - shared
    }),
  )
  const inverse = invert(equations)
  return inverse && ((i, j) => inverse[i]?.[j] ?? 0)
}

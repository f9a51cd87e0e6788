/** What the plots of a comparison show, row by row. Pure. */
import type { BookComparison, ComparedFigure, ComparedRun } from '../../../shared/schemas/book-comparison.ts'
import { dateText } from '../../lib/time.ts'
import { markOf } from '../../ui/plot/marks.tsx'
import type { PlotRow } from '../../ui/plot/rows-plot.tsx'
import { figureText, inInterval } from './compare-words.ts'

export const recordName = (number: number): string => String(number).padStart(4, '0')

/** Treatments in the order of the analysis, then any that only stand among the runs left out. */
export function treatmentsOf({ analysis, runs }: BookComparison): string[] {
  return [...new Set([...(analysis?.design.treatments ?? []), ...runs.map((run) => run.treatment)])].filter((name) => name !== '')
}

export const markFor = (comparison: BookComparison, treatment: string) => {
  const all = treatmentsOf(comparison)
  return markOf(all.indexOf(treatment), all.length)
}

const around = (value: number, U: number | null) => (U === null ? null : ([value - U, value + U] as const))

interface RunRow {
  run: ComparedRun
  value: number
  U: number | null
}

const withFigure = ({ runs }: BookComparison, key: ComparedFigure): RunRow[] =>
  runs.flatMap((run) => {
    const figure = run.figures[key]
    return figure ? [{ run, ...figure }] : []
  })

/** Every run with its ±, under its block or its treatment. */
export function runRows(comparison: BookComparison): PlotRow[] {
  const blocked = comparison.analysis?.design.block != null
  const order = treatmentsOf(comparison)
  const groupOf = (run: ComparedRun) => (blocked ? (run.block ?? 'alone') : run.treatment)
  const rows = withFigure(comparison, comparison.figure)
  const groups = [...new Set((blocked ? [] : order).concat(rows.map(({ run }) => groupOf(run))))]
  const sorted = [...rows].sort(
    (a, b) =>
      groups.indexOf(groupOf(a.run)) - groups.indexOf(groupOf(b.run)) ||
      order.indexOf(a.run.treatment) - order.indexOf(b.run.treatment),
  )
  return sorted.map(({ run, value, U }) => ({
    key: String(run.number),
    group: groupOf(run),
    label: `${blocked ? run.treatment : `${run.place}${run.trialDate ? `, ${dateText(run.trialDate)}` : ''}`}${run.leftOut === null ? '' : ', left out'}`,
    figure: figureText(value, U),
    mark: markFor(comparison, run.treatment),
    at: value,
    bar: around(value, U),
    faint: run.leftOut !== null,
  }))
}

/** The gaps the claim rests on: each pair of treatments with its band; before them, in a paired design, the gap of every plot. */
export function gapRows(comparison: BookComparison): PlotRow[] {
  const { analysis } = comparison
  if (!analysis) return []
  const [own] = analysis.tests
  const two = analysis.design.treatments.length === 2
  const gaps =
    two && own ? [own] : analysis.pairwise.map((pair) => ({ ...pair, interval: two ? pair.interval : pair.tukeyInterval }))
  const plots = analysis.design.kind === 'paired' ? plotGaps(comparison) : []
  return [
    ...plots,
    ...gaps.map(
      ({ first, second, difference, interval }): PlotRow => ({
        key: `${first} − ${second}`,
        group: plots.length > 0 ? `mean of ${plots.length}` : '',
        label: `${first} − ${second}`,
        figure: inInterval(difference, interval),
        mark: 'knot',
        at: difference,
        band: interval,
      }),
    ),
  ]
}

function plotGaps({ analysis, runs, figure }: BookComparison): PlotRow[] {
  const [first, second] = analysis!.design.treatments
  const interval = analysis!.tests[0]!.interval
  return analysis!.design.blocks.map((block) => {
    const of = (treatment: string | undefined) =>
      runs.find((run) => run.block === block && run.treatment === treatment && run.leftOut === null)?.figures[figure]?.value ?? 0
    const gap = of(first) - of(second)
    return {
      key: block,
      group: 'plot by plot',
      label: block,
      figure: inInterval(gap, interval),
      mark: 'stroke',
      at: gap,
      fromZero: true,
    }
  })
}

/** Fuel per hour against what could be expected. */
export function rateRows(comparison: BookComparison): PlotRow[] {
  return withFigure(comparison, 'l_per_h')
    .flatMap(({ run, value, U }) => {
      if (!run.expected) return []
      const { from, to, ground } = run.expected
      return [
        {
          key: String(run.number),
          group: `${run.treatment}, ${ground}`,
          label: `${run.place}${run.trialDate ? `, ${dateText(run.trialDate)}` : ''}`,
          figure: figureText(value, U),
          mark: markFor(comparison, run.treatment),
          at: value,
          bar: around(value, U),
          band: [from, to] as const,
          pale: true,
          faint: run.leftOut !== null,
        },
      ]
    })
    .sort((a, b) => a.group.localeCompare(b.group))
}

/** Means of each treatment by season and region, with the range of their runs; a run left out does not count. */
export function seasonRows(comparison: BookComparison): PlotRow[] {
  const cells = new Map<string, RunRow[]>()
  for (const row of withFigure(comparison, comparison.figure)) {
    if (row.run.leftOut !== null) continue
    const key = JSON.stringify([row.run.season, row.run.region, row.run.treatment])
    cells.set(key, [...(cells.get(key) ?? []), row])
  }
  const order = treatmentsOf(comparison)
  // Runs come oldest first.
  const seasons = [...new Set(comparison.runs.map((run) => run.season))]
  return [...cells]
    .map(([key, rows]) => {
      const [season = '', region = '', treatment = ''] = JSON.parse(key) as string[]
      const values = rows.map((row) => row.value)
      const mean = values.reduce((sum, x) => sum + x, 0) / values.length
      const U = rows[0]?.U ?? null
      return { season, region, treatment, mean, U, values }
    })
    .sort(
      (a, b) =>
        seasons.indexOf(a.season) - seasons.indexOf(b.season) ||
        a.region.localeCompare(b.region) ||
        order.indexOf(a.treatment) - order.indexOf(b.treatment),
    )
    .map(({ season, region, treatment, mean, U, values }) => ({
      key: `${season} ${region} ${treatment}`,
      group: `${season}, ${region || 'no region'}`,
      label: `${treatment}, ${values.length} ${values.length === 1 ? 'run' : 'runs'}`,
      figure: figureText(mean, U),
      mark: markFor(comparison, treatment),
      at: mean,
      bar: values.length > 1 ? ([Math.min(...values), Math.max(...values)] as const) : null,
    }))
}

export interface DepthPoint {
  key: string
  treatment: string
  depth_cm: number
  value: number
  U: number | null
  faint: boolean
}

/** Each run's figure over its depth. */
export const depthPoints = (comparison: BookComparison, key: ComparedFigure): DepthPoint[] =>
  withFigure(comparison, key).flatMap(({ run, value, U }) => {
    const depth = run.figures.depth_mean_cm
    return depth
      ? [{ key: String(run.number), treatment: run.treatment, depth_cm: depth.value, value, U, faint: run.leftOut !== null }]
      : []
  })

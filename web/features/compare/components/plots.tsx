import type { BookComparison } from '../../../../shared/schemas/book-comparison.ts'
import { RESULTS } from '../../../../shared/trial/result.ts'
import { PlotMark } from '../../../ui/plot/marks.tsx'
import { PlainTable } from '../../../ui/plot/plain-table.tsx'
import { PlotFigure } from '../../../ui/plot/plot-figure.tsx'
import { type PlotRow, rowsPlot } from '../../../ui/plot/rows-plot.tsx'
import { figureText, minus } from '../compare-words.ts'
import { depthPoints, gapRows, markFor, rateRows, recordName, runRows, seasonRows, treatmentsOf } from '../plot-rows.ts'
import { depthPlot } from './depth-plot.tsx'

/** What each mark stands for. */
export function Legend({ comparison }: { comparison: BookComparison }) {
  return (
    <ul className="flex flex-wrap gap-x-3">
      {treatmentsOf(comparison).map((treatment) => (
        <li key={treatment} className="flex items-center gap-1">
          <svg width="18" height="18" aria-hidden="true">
            <PlotMark kind={markFor(comparison, treatment)} x={9} y={9} />
          </svg>
          {treatment}
        </li>
      ))}
    </ul>
  )
}

export function Plots({ comparison }: { comparison: BookComparison }) {
  const { label, unit, analysis } = comparison
  const gaps = gapRows(comparison)
  const rates = rateRows(comparison)
  const areaFigure = comparison.figure === 'depth_mean_cm' ? 'l_per_ha' : comparison.figure
  const points = depthPoints(comparison, areaFigure)
  const paired = analysis?.design.kind === 'paired'
  return (
    <>
      <RowsFigure
        title={`${sentenceCase(label)}, each run with its ±`}
        says={`${unit}; bars are U, k = 2.${paired ? ' A dotted tie joins a pair.' : ''} Grey: left out.`}
        file="runs"
        rows={runRows(comparison)}
        unit={unit}
        tied={paired}
      />
      {analysis && (
        <RowsFigure
          title={`The gaps in ${label}`}
          says={`${unit}; the band is the 95 % interval${analysis.design.treatments.length > 2 ? ', Tukey’s for all pairs together' : ''}, knotted at the gap. A band across zero shows no difference.`}
          file="gaps"
          rows={gaps}
          unit={unit}
          zero
        />
      )}
      {points.length > 0 && (
        <PlotFigure
          title={`${sentenceCase(RESULTS[areaFigure].label)} and depth`}
          says="Each run’s figure over its mean depth: what stands lower only because it is shallower is no saving. Bars are U, k = 2."
          file="fuel-and-depth"
          draw={(width) =>
            depthPlot({ points, width, unit: RESULTS[areaFigure].unit, markOf: (name) => markFor(comparison, name) })
          }
          table={
            <PlainTable
              caption="Each run with its depth"
              columns={[
                { head: 'record' },
                { head: comparison.of },
                { head: 'depth, cm', figures: true },
                { head: RESULTS[areaFigure].unit, figures: true },
                { head: '±', figures: true },
              ]}
              rows={points.map((p) => ({
                key: p.key,
                cells: [
                  recordName(Number(p.key)),
                  p.treatment,
                  p.depth_cm.toFixed(1),
                  figureText(p.value, p.U),
                  figureText(p.U ?? 0, p.U),
                ],
              }))}
            />
          }
        />
      )}
      {rates.length > 0 && (
        <RowsFigure
          title="Fuel per hour and what was to be expected"
          says="L/h; the pale band is what could be expected, on the ground named over it; bars are U, k = 2."
          file="fuel-rate"
          rows={rates}
          unit="L/h"
          zero
        />
      )}
      <RowsFigure
        title="Seasons and regions"
        says={`${unit}; means, with bars from the lowest to the highest run.`}
        file="seasons-and-regions"
        rows={seasonRows(comparison)}
        unit={unit}
      />
    </>
  )
}

interface RowsFigureProps {
  title: string
  says: string
  file: string
  rows: readonly PlotRow[]
  unit: string
  zero?: boolean
  tied?: boolean
}

function RowsFigure({ title, says, file, rows, unit, zero = false, tied = false }: RowsFigureProps) {
  if (rows.length === 0) return null
  const ends = (['bar', 'band'] as const).filter((kind) => rows.some((row) => row[kind]))
  const endText = (row: PlotRow, kind: 'bar' | 'band', i: 0 | 1) => {
    const range = row[kind]
    return range ? minus(String(Number(range[i].toPrecision(4)))) : '–'
  }
  return (
    <PlotFigure
      title={title}
      says={says}
      file={file}
      draw={(width) => rowsPlot({ rows, unit, width, zero, tied })}
      table={
        <PlainTable
          caption={title}
          columns={[
            { head: 'row' },
            { head: 'of' },
            { head: unit, figures: true },
            ...ends.flatMap((kind) => [
              { head: `${kind} from`, figures: true },
              { head: `${kind} to`, figures: true },
            ]),
          ]}
          rows={rows.map((row) => ({
            key: row.key,
            cells: [row.label, row.group, row.figure, ...ends.flatMap((kind) => [endText(row, kind, 0), endText(row, kind, 1)])],
          }))}
        />
      }
    />
  )
}

const sentenceCase = (text: string): string => text.slice(0, 1).toUpperCase() + text.slice(1)

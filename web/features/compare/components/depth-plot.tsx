import { type MarkKind, PlotMark, PlotText } from '../../../ui/plot/marks.tsx'
import { PlotTape, TAPE_PX } from '../../../ui/plot/tape.tsx'
import { tapeScale } from '../../../ui/plot/tape-scale.ts'
import type { DepthPoint } from '../plot-rows.ts'

const TALL_PX = 300
const LEFT_PX = 54
const LEGEND_PX = 22

interface DepthPlotProps {
  points: readonly DepthPoint[]
  unit: string
  width: number
  markOf: (treatment: string) => MarkKind
}

/** A run's figure up, its depth along; the legend stands in the picture, which is taken away without the page. */
export function depthPlot({ points, unit, width, markOf }: DepthPlotProps) {
  const names = [...new Set(points.map((p) => p.treatment))]
  const top = 34 + names.length * LEGEND_PX
  const foot = top + TALL_PX
  const along = tapeScale(
    points.map((p) => p.depth_cm),
    [LEFT_PX, width - 16],
  )
  const up = tapeScale(
    points.flatMap((p) => [p.value - (p.U ?? 0), p.value + (p.U ?? 0)]),
    [foot, top],
  )
  const body = (
    <>
      {names.map((name, i) => (
        <g key={name}>
          <PlotMark kind={markOf(name)} x={9} y={9 + i * LEGEND_PX} />
          <PlotText x={24} y={14 + i * LEGEND_PX}>
            {name}
          </PlotText>
        </g>
      ))}
      <PlotText x={0} y={top - 14} faint>
        {`${unit}${up.from > 0 ? `; begins at ${up.from}` : ''}`}
      </PlotText>
      {up.major.map((figure) => (
        <g key={figure}>
          <path d={`M${LEFT_PX} ${up.at(figure)}H${width - 16}`} stroke="var(--feint)" />
          <PlotText x={LEFT_PX - 8} y={up.at(figure) + 4} anchor="end" figures>
            {String(figure)}
          </PlotText>
        </g>
      ))}
      <PlotTape tape={along} top={top} y={foot} unit="mean depth, cm" />
      {points.map((p) => (
        <g key={p.key}>
          {p.U !== null && (
            <path
              d={`M${along.at(p.depth_cm)} ${up.at(p.value - p.U)}V${up.at(p.value + p.U)}`}
              stroke={p.faint ? 'var(--line)' : 'var(--ink)'}
              strokeWidth="1.2"
            />
          )}
          <PlotMark kind={markOf(p.treatment)} x={along.at(p.depth_cm)} y={up.at(p.value)} faint={p.faint} />
        </g>
      ))}
    </>
  )
  return { height: foot + TAPE_PX, body }
}

import { type MarkKind, PlotMark, PlotText } from '../../../ui/plot/marks.tsx'
import { PlotTape, TAPE_PX } from '../../../ui/plot/tape.tsx'
import { tapeScale } from '../../../ui/plot/tape-scale.ts'
import type { DepthPoint } from '../plot-rows.ts'

const TALL_PX = 300
const LEFT_PX = 54

interface DepthPlotProps {
  points: readonly DepthPoint[]
  unit: string
  width: number
  markOf: (treatment: string) => MarkKind
}

/** A run's figure up, its depth along. */
export function depthPlot({ points, unit, width, markOf }: DepthPlotProps) {
  const along = tapeScale(
    points.map((p) => p.depth_cm),
    [LEFT_PX, width - 16],
  )
  const up = tapeScale(
    points.flatMap((p) => [p.value - (p.U ?? 0), p.value + (p.U ?? 0)]),
    [TALL_PX, 30],
  )
  const body = (
    <>
      <PlotText x={0} y={14} faint>
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
      <PlotTape tape={along} top={30} y={TALL_PX} unit="mean depth, cm" />
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
  return { height: TALL_PX + TAPE_PX, body }
}

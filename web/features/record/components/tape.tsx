import { Link } from 'react-router-dom'
import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import { paths } from '../../../lib/paths.ts'
import { type Axis, axisAround } from '../../../ui/plot/tape-axis.ts'

export interface OtherRun {
  number: number
  value: number
}

interface TapeProps {
  value: number
  U: number | null
  unit: string
  /** Runs of the same tractor and implement at the same place on the same day. */
  others: readonly OtherRun[]
}

const LINE_PX = 34

/** The figure as a knot on its band, on a measuring tape; other runs of that day as dotted marks. */
export function Tape({ value, U, unit, others }: TapeProps) {
  const axis = axisAround([value - (U ?? 0), value + (U ?? 0), ...others.map((o) => o.value)])
  const at = (figure: number) => `${((figure - axis.from) / (axis.to - axis.from)) * 100}%`
  const shown = roundByUncertainty(value, U)
  return (
    <figure className="px-margin pb-2">
      <svg
        role="img"
        aria-label={`${shown.value}${shown.U ? ` ± ${shown.U}` : ''} ${unit} on a tape from ${axis.from} to ${axis.to}`}
        width="100%"
        height="62"
        className="overflow-visible"
      >
        {U !== null && (
          <rect
            x={at(value - U)}
            width={`${((2 * U) / (axis.to - axis.from)) * 100}%`}
            y={LINE_PX - 24}
            height="18"
            fill="var(--straw)"
            stroke="var(--ink)"
            strokeWidth="1.4"
          />
        )}
        {others.map((o) => (
          <line
            key={o.number}
            x1={at(o.value)}
            x2={at(o.value)}
            y1={LINE_PX - 28}
            y2={LINE_PX}
            stroke="var(--ink)"
            strokeWidth="1.6"
            strokeDasharray="2 2"
          />
        ))}
        <svg x={at(value)} y={LINE_PX - 15} overflow="visible" aria-hidden="true">
          <path d="M-9-9 9 9V-9L-9 9Z" fill="var(--ink)" />
        </svg>
        <Ticks axis={axis} at={at} />
      </svg>
      <figcaption className="label">
        {unit}; the tape begins at {axis.from}.{' '}
        {others.length > 0 && (
          <>
            Dotted: the same tractor and implement here on that day,{' '}
            {others.map((o, i) => (
              <span key={o.number}>
                {i > 0 && ', '}
                <Link className="word" to={paths.record.to(o.number)}>
                  {o.value.toFixed(1)}
                </Link>
              </span>
            ))}
            .
          </>
        )}
      </figcaption>
    </figure>
  )
}

const Ticks = ({ axis, at }: { axis: Axis; at: (figure: number) => string }) => (
  <g>
    <line x1="0" x2="100%" y1={LINE_PX} y2={LINE_PX} stroke="var(--ink)" strokeWidth="1.6" />
    {axis.minor.map((figure) => (
      <line key={figure} x1={at(figure)} x2={at(figure)} y1={LINE_PX} y2={LINE_PX + 5} stroke="var(--line)" strokeWidth="1" />
    ))}
    {axis.major.map((figure) => (
      <g key={figure}>
        <line x1={at(figure)} x2={at(figure)} y1={LINE_PX} y2={LINE_PX + 9} stroke="var(--ink)" strokeWidth="1.6" />
        <text x={at(figure)} y={LINE_PX + 24} textAnchor="middle" className="figures" fontSize="13.5" fill="var(--ink)">
          {figure}
        </text>
      </g>
    ))}
  </g>
)

import { axisAround } from '../../../ui/plot/tape-axis.ts'

interface KnotProps {
  value: number
  U: number | null
  unit: string
  firm: boolean
}

const LINE_PX = 44

/** The figure as a knot on its band, on a tape as wide as the screen; the band is hatched while a doubt stands on it. */
export function Knot({ value, U, unit, firm }: KnotProps) {
  const axis = axisAround([value - (U ?? 0), value + (U ?? 0)])
  const at = (figure: number) => `${((figure - axis.from) / (axis.to - axis.from)) * 100}%`
  return (
    <svg
      role="img"
      aria-label={`a tape from ${axis.from} to ${axis.to} ${unit}`}
      width="100%"
      height="86"
      className="mb-2 overflow-visible px-3"
    >
      <defs>
        <pattern id="not-firm" width="7" height="7" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <rect width="7" height="7" fill="var(--straw)" />
          <line x1="0" x2="0" y1="0" y2="7" stroke="var(--ink)" strokeWidth="2" />
        </pattern>
      </defs>
      {U !== null && (
        <rect
          x={at(value - U)}
          width={`${((2 * U) / (axis.to - axis.from)) * 100}%`}
          y={LINE_PX - 36}
          height="32"
          fill={firm ? 'var(--straw)' : 'url(#not-firm)'}
          stroke="var(--ink)"
          strokeWidth="2"
        />
      )}
      <svg x={at(value)} y={LINE_PX - 20} overflow="visible" aria-hidden="true">
        <path d="M-18-16 18 16V-16L-18 16Z" fill="var(--ink)" />
      </svg>
      <line x1="0" x2="100%" y1={LINE_PX} y2={LINE_PX} stroke="var(--ink)" strokeWidth="2.5" />
      {axis.minor.map((figure) => (
        <line key={figure} x1={at(figure)} x2={at(figure)} y1={LINE_PX} y2={LINE_PX + 8} stroke="var(--ink)" strokeWidth="1" />
      ))}
      {axis.major.map((figure, i) => (
        <g key={figure} className={i % 2 ? 'max-sm:hidden' : ''}>
          <line x1={at(figure)} x2={at(figure)} y1={LINE_PX} y2={LINE_PX + 14} stroke="var(--ink)" strokeWidth="2.5" />
          <text x={at(figure)} y={LINE_PX + 36} textAnchor="middle" className="figures" fontSize="20" fill="var(--ink)">
            {figure}
          </text>
        </g>
      ))}
    </svg>
  )
}

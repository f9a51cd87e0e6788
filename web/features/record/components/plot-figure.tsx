import { type Lengths, pegsOf } from '../plot-shape.ts'
import type { Sources } from '../record-model.ts'

const WIDE_PX = 150
const TALL_PX = 92
const EDGE_PX = 16

/** The plot to scale, with its pegs and, where four sides were taped, the diagonal that makes two triangles of them. */
export function PlotFigure({ sources }: { sources: Sources }) {
  const lengths = lengthsOf(sources)
  const pegs = lengths && pegsOf(lengths)
  if (!pegs) return null
  const wide = Math.max(...pegs.map((p) => p.x))
  const tall = Math.max(...pegs.map((p) => p.y))
  const scale = Math.min((WIDE_PX - 2 * EDGE_PX) / wide, (TALL_PX - 2 * EDGE_PX) / tall)
  const x = (m: number) => EDGE_PX + (WIDE_PX - 2 * EDGE_PX - wide * scale) / 2 + m * scale
  const y = (m: number) => EDGE_PX + (TALL_PX - 2 * EDGE_PX - tall * scale) / 2 + m * scale
  const middle = { x: wide / 2, y: tall / 2 }
  const [a, , c] = pegs
  return (
    <svg
      role="img"
      aria-label={lengths.ac === undefined ? 'The plot, a rectangle, to scale' : 'The plot, two triangles on A–C, to scale'}
      width={WIDE_PX}
      height={TALL_PX}
      className="shrink-0"
      fill="none"
      stroke="var(--ink)"
    >
      <path d={`M${pegs.map((p) => `${x(p.x)} ${y(p.y)}`).join('L')}Z`} strokeWidth="1.6" />
      {a && c && lengths.ac !== undefined && (
        <path d={`M${x(a.x)} ${y(a.y)}L${x(c.x)} ${y(c.y)}`} strokeWidth="1.2" strokeDasharray="4 3" />
      )}
      {pegs.map((p) => (
        <text
          key={p.name}
          x={x(p.x) + (p.x < middle.x ? -8 : 8)}
          y={y(p.y) + (p.y < middle.y ? -2 : 10)}
          textAnchor="middle"
          fontSize="12.5"
          fill="var(--graphite)"
          stroke="none"
        >
          {p.name}
        </text>
      ))}
    </svg>
  )
}

function lengthsOf({ readings, record }: Sources): Lengths | null {
  const from = record.results.area_m2?.from ?? []
  const length = (key: string): number | undefined => {
    const value = readings.get(key)?.value
    return from.includes(key) && typeof value === 'number' ? value : undefined
  }
  const [ab, bc] = [length('side_ab_m'), length('side_bc_m')]
  if (ab === undefined || bc === undefined) return null
  const [cd, da, ac] = [length('side_cd_m'), length('side_da_m'), length('diag_ac_m')]
  return cd !== undefined && da !== undefined && ac !== undefined ? { ab, bc, cd, da, ac } : { ab, bc }
}

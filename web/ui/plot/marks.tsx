import { symbol, symbolCircle, symbolSquare } from 'd3-shape'

/** Two things compared: solid disc and open square; more: letters; a mean: a knot on its band. */
export type MarkKind = 'disc' | 'square' | 'knot' | 'stroke' | `letter ${string}`

const AREA = { disc: 100, square: 92 } as const
const LETTERS = 'abcdefghijklmnopqrstuvwxyz'

export const markOf = (place: number, count: number): MarkKind =>
  count > 2 ? `letter ${LETTERS[place % LETTERS.length]}` : place === 0 ? 'disc' : 'square'

export function PlotMark({ kind, x, y, faint = false }: { kind: MarkKind; x: number; y: number; faint?: boolean }) {
  const ink = faint ? 'var(--line)' : 'var(--ink)'
  const place = `translate(${x} ${y})`
  if (kind === 'disc') return <path d={symbol(symbolCircle, AREA.disc)() ?? ''} transform={place} fill={ink} />
  if (kind === 'square')
    return (
      <path d={symbol(symbolSquare, AREA.square)() ?? ''} transform={place} fill="var(--paper)" stroke={ink} strokeWidth="2" />
    )
  if (kind === 'knot') return <path d="M-8-8 8 8V-8L-8 8Z" transform={place} fill={ink} />
  if (kind === 'stroke') return <path d="M0-8V8" transform={place} stroke={ink} strokeWidth="2.4" />
  return (
    <g transform={place}>
      <circle r="8" fill="var(--paper)" stroke={ink} strokeWidth="1.4" />
      <PlotText x={0} y={4} anchor="middle" size={12.5} figures faint={faint}>
        {kind.slice(-1)}
      </PlotText>
    </g>
  )
}

/** A bar with end strokes. */
export function PlotBar({ from, to, y, faint = false }: { from: number; to: number; y: number; faint?: boolean }) {
  return (
    <path
      d={`M${from} ${y - 5}V${y + 5}M${from} ${y}H${to}M${to} ${y - 5}V${y + 5}`}
      fill="none"
      stroke={faint ? 'var(--line)' : 'var(--ink)'}
      strokeWidth="1.6"
    />
  )
}

/** The straw band; its ink edge carries the shape. */
export function PlotBand({ from, to, y, pale = false }: { from: number; to: number; y: number; pale?: boolean }) {
  return (
    <rect
      x={from}
      width={Math.max(1, to - from)}
      y={y - 9}
      height="18"
      fill={pale ? 'var(--straw-pale)' : 'var(--straw)'}
      stroke="var(--ink)"
      strokeWidth={pale ? 0.8 : 1.4}
    />
  )
}

interface PlotTextProps {
  x: number
  y: number
  children: string
  anchor?: 'start' | 'middle' | 'end'
  size?: number
  figures?: boolean
  bold?: boolean
  faint?: boolean
}

/** Text that keeps its look in a downloaded file: everything stands in attributes. */
export function PlotText({
  x,
  y,
  children,
  anchor = 'start',
  size = 13.5,
  figures = false,
  bold = false,
  faint = false,
}: PlotTextProps) {
  return (
    <text
      x={x}
      y={y}
      textAnchor={anchor}
      fontSize={size}
      fontFamily={figures ? 'var(--face-figures)' : 'var(--face)'}
      fontWeight={bold ? 700 : figures ? 600 : 430}
      fill={faint ? 'var(--graphite)' : 'var(--ink)'}
    >
      {children}
    </text>
  )
}

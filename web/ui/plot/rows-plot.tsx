import { line } from 'd3-shape'
import { type MarkKind, PlotBand, PlotBar, PlotMark, PlotText } from './marks.tsx'
import { PlotTape, TAPE_PX } from './tape.tsx'
import { type TapeScale, tapeScale } from './tape-scale.ts'

export interface PlotRow {
  key: string
  /** Printed over the first of the rows that share it. */
  group: string
  label: string
  /** The figure as written in the row. */
  figure: string
  mark: MarkKind
  at: number
  /** Bar with end strokes. */
  bar?: readonly [number, number] | null
  /** Band under the mark; pale where it is not the figure's own. */
  band?: readonly [number, number] | null
  pale?: boolean
  /** A thick line from zero to the mark. */
  fromZero?: boolean
  /** Not counted: drawn in line grey. */
  faint?: boolean
}

interface RowsPlotProps {
  rows: readonly PlotRow[]
  unit: string
  width: number
  /** The tape reaches zero. */
  zero?: boolean
  /** A dotted tie between the rows of a group that count. */
  tied?: boolean
}

const ROW_PX = 26
const HEAD_PX = 28
const NARROW_PX = 560

interface Laid {
  row: PlotRow
  y: number
  heads: boolean
}

function laidOut(rows: readonly PlotRow[]): { laid: Laid[]; bottom: number } {
  const laid: Laid[] = []
  let y = 0
  rows.forEach((row, i) => {
    const heads = row.group !== '' && row.group !== rows[i - 1]?.group
    if (heads) y += HEAD_PX
    laid.push({ row, y: y + ROW_PX / 2, heads })
    y += ROW_PX
  })
  return { laid, bottom: y + 6 }
}

/** Rows of labels, figures and marks over one tape: each mark has its number in its row. */
export function rowsPlot({ rows, unit, width, zero = false, tied = false }: RowsPlotProps) {
  const { laid, bottom } = laidOut(rows)
  const narrow = width < NARROW_PX
  const labels = narrow ? Math.round(width * 0.3) : 250
  const figures = narrow ? 60 : 84
  const all = rows.flatMap((row) => [row.at, ...(row.bar ?? []), ...(row.band ?? [])])
  const tape = tapeScale(all, [labels + figures + 16, width - 16], zero || rows.some((row) => row.fromZero))
  const body = (
    <>
      <PlotTape tape={tape} top={4} y={bottom} unit={unit} />
      {tied && <Ties laid={laid} tape={tape} />}
      {laid.map(({ row, y, heads }) => (
        <g key={row.key}>
          {heads && (
            <PlotText x={0} y={y - ROW_PX / 2 - 7} bold>
              {cut(row.group, width)}
            </PlotText>
          )}
          <PlotText x={0} y={y + 4} faint>
            {cut(row.label, labels)}
          </PlotText>
          <PlotText x={labels + figures - 6} y={y + 4} anchor="end" figures faint={row.faint ?? false}>
            {row.figure}
          </PlotText>
          <RowMarks row={row} y={y} tape={tape} />
        </g>
      ))}
    </>
  )
  return { height: bottom + TAPE_PX, body }
}

function RowMarks({ row, y, tape }: { row: PlotRow; y: number; tape: TapeScale }) {
  const faint = row.faint ?? false
  return (
    <>
      {row.band && <PlotBand from={tape.at(row.band[0])} to={tape.at(row.band[1])} y={y} pale={row.pale ?? false} />}
      {row.bar && <PlotBar from={tape.at(row.bar[0])} to={tape.at(row.bar[1])} y={y} faint={faint} />}
      {row.fromZero && <path d={`M${tape.at(0)} ${y}H${tape.at(row.at)}`} stroke="var(--ink)" strokeWidth="4" />}
      <PlotMark kind={row.mark} x={tape.at(row.at)} y={y} faint={faint} />
    </>
  )
}

function Ties({ laid, tape }: { laid: readonly Laid[]; tape: TapeScale }) {
  const path = line<Laid>(
    ({ row }) => tape.at(row.at),
    ({ y }) => y,
  )
  const counted = laid.filter(({ row }) => !row.faint)
  const groups = [...new Set(counted.map(({ row }) => row.group))].map((group) =>
    counted.filter(({ row }) => row.group === group),
  )
  return groups.map((members) => (
    <path
      key={members[0]?.row.key}
      d={path(members) ?? ''}
      fill="none"
      stroke="var(--ink)"
      strokeWidth="1.4"
      strokeDasharray="2 3"
    />
  ))
}

/** A label never runs into the figures: about 7 px a letter. */
const cut = (text: string, room_px: number): string => {
  const most = Math.floor(room_px / 7)
  return text.length <= most ? text : `${text.slice(0, most - 1)}…`
}

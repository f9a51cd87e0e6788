import { cellBounds } from '../../../../shared/layouts/geometry.ts'
import { isComb, type LayoutCell } from '../../../../shared/layouts/layout.ts'
import { type DeskItem, LETTERS } from '../model/desk-items.ts'
import { BLANK_RULES } from '../model/desk-view.ts'
import type { Desk } from '../use-desk.ts'
import { CellMark } from './cell-mark.tsx'
import { SheetDrawing } from './sheet-drawing.tsx'

/** Everything that lies over the page, in millimetres of the page. Decoration: the same is said in words in the margin. */
export function SheetMarks({ desk, inBox }: { desk: Desk; inBox: boolean }) {
  const { layout, sheet, view, items, item, key } = desk
  const cells = new Map(layout.cells.map((c) => [c.key, c]))
  const inHand = key ? cells.get(key) : undefined
  const lettered = (item?.cells ?? []).flatMap((k, i) => {
    const cell = cells.get(k)
    return cell && k !== key ? [{ cell, letter: LETTERS[i] ?? '' }] : []
  })
  const { width, height } = layout.page
  return (
    <svg aria-hidden="true" viewBox={`0 0 ${width} ${height}`} className="pointer-events-none absolute inset-0 h-full w-full">
      <defs>
        <pattern id="hatch" width="1.1" height="1.1" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <path d="M0.2 0V1.1" stroke="var(--ink)" strokeWidth="0.38" />
        </pattern>
      </defs>
      {inBox && <SheetDrawing layout={layout} planned={sheet.planned} />}
      {inHand && <RowInHand cell={inHand} page={layout.page} />}
      {layout.cells.map((cell) => {
        const reading = view.readings.get(cell.key)
        if (!reading || (sheet.planned && isComb(cell) && cell.planned)) return null
        return <CellMark key={cell.key} cell={cell} reading={reading} values={view.values} inBox={inBox} />
      })}
      {items
        .filter((one) => !(sheet.origin === 'keyed' && one.doubt && BLANK_RULES.has(one.doubt.rule)))
        .map((one) => (
          <DoubtTab key={one.id} item={one} cells={cells} held={one.id === item?.id} />
        ))}
      {lettered.map(({ cell, letter }) => (
        <Lettered key={cell.key} cell={cell} letter={letter} />
      ))}
      {inHand && <HandFrame cell={inHand} />}
    </svg>
  )
}

type Cells = ReadonlyMap<string, LayoutCell>

/** The strip of the page a cell's row takes, mm: no higher than the rows of the fuel ledger stand apart. */
export function rowOf(cell: LayoutCell): { top: number; low: number } {
  const { y, height } = cellBounds(cell)
  return { top: y - 0.9, low: y + height + 1.5 }
}

/** The straw row behind the cell in hand, and the band from it to the margin; the ink shows through. */
function RowInHand({ cell, page }: { cell: LayoutCell; page: { width: number } }) {
  const { x, width } = cellBounds(cell)
  const { top, low } = rowOf(cell)
  const right = x + width + 1.2
  return (
    <>
      <rect x="0" y={top} width={page.width} height={low - top} fill="var(--straw-pale)" style={{ mixBlendMode: 'multiply' }} />
      <path d={`M0 ${top}H${page.width}M0 ${low}H${page.width}`} stroke="var(--ink)" strokeWidth="0.25" />
      <rect
        x={right}
        y={low - 1.2}
        width={page.width - right + 1}
        height="1.2"
        fill="var(--straw)"
        stroke="var(--ink)"
        strokeWidth="0.25"
      />
    </>
  )
}

function HandFrame({ cell }: { cell: LayoutCell }) {
  const { x, y, width, height } = cellBounds(cell)
  return <rect x={x - 1} y={y - 1} width={width + 2} height={height + 2} fill="none" stroke="var(--ink)" strokeWidth="0.9" />
}

/** A hatched tab at the left end, numbered in order of work; left of the boxes, so that their label stays readable. */
function DoubtTab({ item, cells, held }: { item: DeskItem; cells: Cells; held: boolean }) {
  const cell = cells.get(item.reading?.key ?? item.cells[0] ?? '')
  if (!cell || !item.open || (held && item.reading)) return null
  const { x, y, height } = cellBounds(cell)
  const number = String(item.number)
  const width = 0.9 + number.length * 1.55
  const middle = y + height / 2
  return (
    <g>
      <rect x={x - 2.6} y={y} width="2.4" height={height} fill="var(--leaf)" />
      <rect x={x - 2.6} y={y} width="2.4" height={height} fill="url(#hatch)" stroke="var(--ink)" strokeWidth="0.3" />
      <rect
        x={x - 0.2 - width}
        y={middle - 1.7}
        width={width}
        height="3.4"
        fill="var(--leaf)"
        stroke="var(--ink)"
        strokeWidth="0.3"
      />
      <text
        x={x - 0.2 - width / 2}
        y={middle + 0.95}
        fontSize="2.6"
        fontWeight="700"
        textAnchor="middle"
        className="figures"
        fill="var(--ink)"
      >
        {number}
      </text>
    </g>
  )
}

function Lettered({ cell, letter }: { cell: LayoutCell; letter: string }) {
  const { x, y, width, height } = cellBounds(cell)
  const middle = y + height / 2
  // At the right end; a tick box has its label there, so its letter stands before it.
  const left = cell.kind === 'tick' ? x - 3.8 : x + width + 0.6
  return (
    <g>
      <rect x={x - 0.6} y={y - 0.6} width={width + 1.2} height={height + 1.2} fill="none" stroke="var(--ink)" strokeWidth="0.5" />
      <rect x={left} y={middle - 1.8} width="3.2" height="3.6" fill="var(--ink)" />
      <text x={left + 1.6} y={middle + 1} fontSize="2.8" fontWeight="700" textAnchor="middle" fill="#fff">
        {letter}
      </text>
    </g>
  )
}

/** From the layout's definition to boxes in millimetres: the only place that knows how a comb is laid out. */
import { BOX, type CombCell, type Layout, type LayoutCell, TICK } from './layout.ts'

export interface Box {
  x: number
  y: number
  width: number
  height: number
  option?: string
}

const round = (mm: number) => Math.round(mm * 1000) / 1000

/** Where a printed point, colon or hyphen stands, in writing order. */
export interface Separator {
  x: number
  y: number
  mark: string
}

/** Lays the boxes of a comb from left to right; a gap follows the thousands, a wider one holds each printed mark. */
export function layComb(cell: CombCell): { boxes: Box[]; separators: Separator[]; width: number } {
  const whole = /^9+/.exec(cell.format)?.[0].length ?? 0
  const thousandAfter = cell.kind === 'digits' && whole > 3 ? whole - 3 : -1
  const boxes: Box[] = []
  const separators: Separator[] = []
  let x = cell.x
  for (const mark of cell.format) {
    if (mark === '9') {
      boxes.push({ x: round(x), y: cell.y, width: BOX.width, height: BOX.height })
      x += BOX.width
      if (boxes.length === thousandAfter) x += BOX.thousandGap
    } else {
      separators.push({ x: round(x + BOX.pointGap / 2), y: cell.y, mark })
      x += BOX.pointGap
    }
  }
  return { boxes, separators, width: round(x - cell.x) }
}

/** The boxes of any cell, in writing order. */
export function boxesOf(cell: LayoutCell): Box[] {
  switch (cell.kind) {
    case 'tick':
      return [{ x: cell.x, y: cell.y, width: TICK.size, height: TICK.size }]
    case 'choice':
      return cell.options.map(({ option, x, y }) => ({ x, y, width: TICK.size, height: TICK.size, option }))
    case 'line':
    case 'signature':
      return [{ x: cell.x, y: cell.y, width: cell.width, height: cell.height }]
    default:
      return layComb(cell).boxes
  }
}

/** The smallest rectangle around all boxes of a cell. */
export function cellBounds(cell: LayoutCell): Box {
  const boxes = boxesOf(cell)
  const x = Math.min(...boxes.map((b) => b.x))
  const y = Math.min(...boxes.map((b) => b.y))
  return {
    x,
    y,
    width: round(Math.max(...boxes.map((b) => b.x + b.width)) - x),
    height: round(Math.max(...boxes.map((b) => b.y + b.height)) - y),
  }
}

/** The unit a cell's reading is stored in, or null. */
export const unitOf = (cell: LayoutCell): string | null => ('unit' in cell ? cell.unit : null)

/** What `npm run sheet -- describe` prints: geometry for anybody who draws on, or reads, the sheet. */
export function describeLayout(layout: Layout) {
  return {
    layout: layout.key,
    version: layout.version,
    page: layout.page,
    cells: layout.cells.map((cell) => ({
      key: cell.key,
      kind: cell.kind,
      label: cell.label,
      unit: unitOf(cell),
      format: 'format' in cell ? cell.format : null,
      need: cell.need,
      scale: 'scale' in cell && cell.scale ? cell.scale : undefined,
      boxes: boxesOf(cell),
    })),
  }
}

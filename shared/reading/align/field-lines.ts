/** What is printed of a field, as lines across and down, in layout millimetres: the same numbers that print it. */
import { type Box, boxesOf, layComb } from '../../layouts/geometry.ts'
import { BOX, isComb, type LayoutCell, TICK } from '../../layouts/layout.ts'
import { type Line, shareWhite } from './lines.ts'

/** A part of a field that is measured on its own: up to three boxes of a comb, or one tick box. */
export interface FieldPart {
  key: string
  /** Which part of the field, from the left. */
  part: number
  boxes: Box[]
  /** Vertical and horizontal lines. */
  upright: Line[]
  level: Line[]
  /** The whole field's upright lines: they tell where the field starts. */
  whole: Line[]
  /** The field's extent. */
  field: { x: number; y: number; width: number; height: number }
  /** The distance at which a comb looks like itself: one box. */
  pitch_mm: number | null
}

const HALF_FRAME = BOX.frame / 2
const thin = (at: number): Line => ({ from: at - HALF_FRAME, to: at + HALF_FRAME })

function combParts(cell: Extract<LayoutCell, { format: string }>): FieldPart[] {
  const { boxes, width } = layComb(cell)
  const { x, y } = cell
  const end = x + width
  const edges = boxes.flatMap((box) => [box.x, box.x + box.width]).filter((at) => at - x > 0.1 && end - at > 0.1)
  const between = edges.filter((at, i) => !edges.slice(0, i).some((other) => Math.abs(other - at) < 0.05))
  const opening = { from: x - BOX.bar, to: x + HALF_FRAME }
  const closing = { from: end - HALF_FRAME, to: end + BOX.bar }
  const whole = shareWhite([opening, ...between.map(thin), closing])
  const parts = Math.max(1, Math.round(boxes.length / 3))
  return Array.from({ length: parts }, (_, part) => {
    const own = boxes.slice(Math.round((part * boxes.length) / parts), Math.round(((part + 1) * boxes.length) / parts))
    const left = own[0]!.x - 0.2
    const right = own.at(-1)!.x + BOX.width + 0.2
    return {
      key: cell.key,
      part,
      boxes: own,
      upright: whole.filter((line) => line.to >= left && line.from <= right),
      level: [thin(y), thin(y + BOX.height)],
      whole,
      field: { x, y, width, height: BOX.height },
      pitch_mm: boxes.length > 1 ? BOX.width : null,
    }
  })
}

function tickPart(key: string, part: number, box: Box): FieldPart {
  const upright = [thin(box.x), thin(box.x + TICK.size)]
  const level = [thin(box.y), thin(box.y + TICK.size)]
  const field = { x: box.x, y: box.y, width: box.width, height: box.height }
  return { key, part, boxes: [box], upright, level, whole: upright, field, pitch_mm: null }
}

/** Lines of writing and signatures have no frame: they take their place from their neighbours. */
export function fieldParts(cell: LayoutCell): FieldPart[] {
  if (isComb(cell)) return combParts(cell)
  if (cell.kind === 'tick' || cell.kind === 'choice') return boxesOf(cell).map((box, i) => tickPart(cell.key, i, box))
  return []
}

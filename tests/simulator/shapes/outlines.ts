/** Where each cell of a page lies in the picture, in the shape of NAME.map.json. */
import { type Box, boxesOf } from '../../../shared/layouts/geometry.ts'
import { isComb, type Layout } from '../../../shared/layouts/layout.ts'
import type { PhotoMap } from '../make-photo.ts'

type Place = (x_mm: number, y_mm: number) => readonly [number, number]

const hundredths = (value: number) => Math.round(value * 100) / 100

function outline(boxes: readonly Box[], place: Place): Array<[number, number]> {
  const left = Math.min(...boxes.map((b) => b.x))
  const top = Math.min(...boxes.map((b) => b.y))
  const right = Math.max(...boxes.map((b) => b.x + b.width))
  const low = Math.max(...boxes.map((b) => b.y + b.height))
  const corners = [place(left, top), place(right, top), place(right, low), place(left, low)]
  return corners.map(([x, y]) => [hundredths(x), hundredths(y)])
}

/** Outlines of the cells that are on the sheet: whole combs as one, and each of their boxes by its number from 1. */
export function outlinesOf(layout: Layout, keys: ReadonlySet<string>, place: Place): PhotoMap {
  const cells: PhotoMap['cells'] = {}
  for (const cell of layout.cells) {
    if (!keys.has(cell.key)) continue
    const boxes = boxesOf(cell)
    cells[cell.key] = outline(boxes, place)
    if (!isComb(cell) && cell.kind !== 'choice') continue
    boxes.forEach((box, i) => {
      cells[`${cell.key}#${box.option ?? i + 1}`] = outline([box], place)
    })
  }
  return { cells }
}

/** Synthetic paper for tests: what is printed of a layout, drawn by its own numbers onto a grey raster through any map. */
import { boxesOf, cellBounds, layComb } from '../../layouts/geometry.ts'
import { BOX, type CombCell, isComb, type Layout, type LayoutCell, TICK } from '../../layouts/layout.ts'
import type { Grey, Point } from '../pixels/grey.ts'

interface Rect {
  x: number
  y: number
  width: number
  height: number
  darkness: number
}

const FRAME = 0.3
const BAR = 0.7
/** Rectangles are kept by tiles of this side. */
const TILE_MM = 4

const outline = (x: number, y: number, width: number, height: number, darkness: number): Rect[] => {
  const half = BOX.frame / 2
  return [
    { x: x - half, y: y - half, width: width + 2 * half, height: 2 * half, darkness },
    { x: x - half, y: y + height - half, width: width + 2 * half, height: 2 * half, darkness },
    { x: x - half, y: y - half, width: 2 * half, height: height + 2 * half, darkness },
    { x: x + width - half, y: y - half, width: 2 * half, height: height + 2 * half, darkness },
  ]
}

export function combRects(cell: CombCell): Rect[] {
  const { boxes, width } = layComb(cell)
  return [
    ...boxes.flatMap((b) => outline(b.x, b.y, b.width, b.height, FRAME)),
    { x: cell.x - BOX.bar, y: cell.y - BOX.barRise, width: BOX.bar, height: BOX.height + 2 * BOX.barRise, darkness: BAR },
    { x: cell.x + width, y: cell.y, width: BOX.bar, height: BOX.height, darkness: BAR },
  ]
}

export function tickRects(x: number, y: number): Rect[] {
  return [
    ...outline(x, y, TICK.size, TICK.size, 0.45),
    { x: x - 0.3, y: y - 0.3, width: 1.7, height: 0.6, darkness: BAR },
    { x: x - 0.3, y: y - 0.3, width: 0.6, height: 1.7, darkness: BAR },
  ]
}

/** The line under a signature or remarks. */
function baselineRect(cell: LayoutCell): Rect {
  const { x, y, width, height } = cellBounds(cell)
  return { x, y: y + height - 0.1, width, height: 0.2, darkness: 0.9 }
}

/** Fields, squares, section rules and lines to write on of a layout; no words. */
export function layoutRects(layout: Layout): Rect[] {
  return [
    ...layout.cells.flatMap((cell) =>
      isComb(cell)
        ? combRects(cell)
        : cell.kind === 'tick' || cell.kind === 'choice'
          ? boxesOf(cell).flatMap((b) => tickRects(b.x, b.y))
          : [baselineRect(cell)],
    ),
    ...layout.squares.map((s) => ({ x: s.x, y: s.y, width: s.size, height: s.size, darkness: 1 })),
    ...layout.sections.map((s) => ({ x: 14, y: s.y - 0.25, width: layout.page.width - 28, height: 0.5, darkness: 0.9 })),
  ]
}

/**
 * Samples rectangles into pixels, `over` x `over` a pixel. `toPage`: from a pixel's place to millimetres. White is `paper`, outside of
 * `page` is `beside`.
 */
export function drawGrey(
  size: { width: number; height: number },
  rects: readonly Rect[],
  toPage: (px: number, py: number) => Point,
  page: { width: number; height: number },
  over = 3,
  paper = 220,
  beside = 60,
): Grey {
  const columns = Math.ceil(page.width / TILE_MM) + 2
  const tileOf = (x: number, y: number) => Math.floor(y / TILE_MM + 1) * columns + Math.floor(x / TILE_MM + 1)
  const tiles: Rect[][] = []
  for (const rect of rects) {
    for (let y = rect.y; y < rect.y + rect.height + TILE_MM; y += TILE_MM) {
      for (let x = rect.x; x < rect.x + rect.width + TILE_MM; x += TILE_MM) {
        const at = tileOf(Math.min(x, rect.x + rect.width), Math.min(y, rect.y + rect.height))
        tiles[at] ??= []
        if (!tiles[at].includes(rect)) tiles[at].push(rect)
      }
    }
  }
  const shade = ({ x, y }: Point): number => {
    if (x < 0 || y < 0 || x > page.width || y > page.height) return beside
    let darkness = 0
    for (const r of tiles[tileOf(x, y)] ?? []) {
      if (x >= r.x && x < r.x + r.width && y >= r.y && y < r.y + r.height) darkness = Math.max(darkness, r.darkness)
    }
    return paper * (1 - darkness)
  }
  const data = new Uint8Array(size.width * size.height)
  for (let y = 0; y < size.height; y++) {
    for (let x = 0; x < size.width; x++) {
      let sum = 0
      for (let v = 0; v < over; v++) {
        for (let u = 0; u < over; u++) sum += shade(toPage(x + (u + 0.5) / over, y + (v + 0.5) / over))
      }
      data[y * size.width + x] = Math.round(sum / (over * over))
    }
  }
  return { ...size, data }
}

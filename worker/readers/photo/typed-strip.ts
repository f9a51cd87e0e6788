/** One comb as a flat strip of darkness, its printed frames, points and colons taken away: what is left was written or typed. */
import { type Box, boxesOf, cellBounds, layComb } from '../../../shared/layouts/geometry.ts'
import { BOX, type CombCell } from '../../../shared/layouts/layout.ts'
import { brightnessAt, type Grey } from '../../../shared/reading/pixels/grey.ts'

/** Kept off the bars at both ends of a comb, and looked at above and below its boxes, mm. */
const OFF_BARS_MM = 0.4
const BEYOND_MM = 0.5
/** Frames stand this near their place, mm, and are paler than this share of the type's darkness. */
const FRAME_REACH_MM = 0.45
const FRAME_PALER = 0.6
/** Half the width and height of a printed point, colon or hyphen with its soft rim, mm. */
const DOT_MM = [0.75, 0.75] as const
const HYPHEN_MM = [0.8, 0.45] as const
/** Shares of a strip's dots that are at least as bright as paper, and as dark as ink. */
const PAPER_SHARE = 0.3
const INK_SHARE = 0.01
/** Ink at the edge of a mark that was taken away, as a share of the ink's darkness. */
const EDGE_INK = 0.35
/** Darkness, of paper to black, from which there is ink at all. */
const LEAST_INK = 0.3

export interface Strip {
  cell: CombCell
  width: number
  height: number
  px_per_mm: number
  /** Millimetres of the layout at its upper left. */
  x: number
  y: number
  /** 0 paper to 1 black, row by row. */
  darkness: Float32Array
  /** How dark its ink is; 0 where it is bare. */
  ink: number
}

/** @param quad corners of the comb in pixels of `grey`, clockwise from its upper left */
export function cutStrip(grey: Grey, cell: CombCell, quad: ReadonlyArray<readonly [number, number]>, px_per_mm: number): Strip {
  const bounds = cellBounds(cell)
  const area: Box = {
    x: bounds.x + OFF_BARS_MM,
    y: bounds.y - BEYOND_MM,
    width: bounds.width - 2 * OFF_BARS_MM,
    height: bounds.height + 2 * BEYOND_MM,
  }
  const width = Math.round(area.width * px_per_mm)
  const height = Math.round(area.height * px_per_mm)
  const darkness = new Float32Array(width * height)
  const [a, b, c, d] = quad as readonly [
    readonly [number, number],
    readonly [number, number],
    readonly [number, number],
    readonly [number, number],
  ]
  for (let row = 0; row < height; row++) {
    const v = ((row + 0.5) / px_per_mm - BEYOND_MM) / bounds.height
    for (let column = 0; column < width; column++) {
      const u = ((column + 0.5) / px_per_mm + OFF_BARS_MM) / bounds.width
      const x = (1 - v) * ((1 - u) * a[0] + u * b[0]) + v * ((1 - u) * d[0] + u * c[0])
      const y = (1 - v) * ((1 - u) * a[1] + u * b[1]) + v * ((1 - u) * d[1] + u * c[1])
      darkness[row * width + column] = brightnessAt(grey, x, y)
    }
  }
  const sorted = Float32Array.from(darkness).sort()
  const paper = Math.max(1, sorted[Math.floor(sorted.length * (1 - PAPER_SHARE))]!)
  for (let i = 0; i < darkness.length; i++) darkness[i] = Math.max(0, 1 - darkness[i]! / paper)
  const strip: Strip = { cell, width, height, px_per_mm, x: area.x, y: area.y, darkness, ink: 0 }
  blankMarks(strip)
  const dark = Float32Array.from(inner(strip)).sort()
  const ink = dark[Math.floor(dark.length * (1 - INK_SHARE))]!
  strip.ink = ink >= LEAST_INK ? ink : 0
  if (strip.ink > 0) blankFrames(strip)
  return strip
}

/** Columns that lie near no frame: what is dark there is ink. */
function inner({ cell, width, height, px_per_mm, x, darkness }: Strip): number[] {
  const out: number[] = []
  const margin = Math.round((BEYOND_MM + FRAME_REACH_MM) * px_per_mm)
  for (const box of boxesOf(cell)) {
    const from = Math.max(0, Math.round((box.x + FRAME_REACH_MM - x) * px_per_mm))
    const to = Math.min(width, Math.round((box.x + box.width - FRAME_REACH_MM - x) * px_per_mm))
    for (let row = margin; row < height - margin; row++) {
      for (let column = from; column < to; column++) out.push(darkness[row * width + column]!)
    }
  }
  return out
}

function fill(strip: Strip, area: Box, paler: number): void {
  const { width, height, px_per_mm, darkness } = strip
  const left = Math.max(0, Math.round((area.x - strip.x) * px_per_mm))
  const right = Math.min(width, Math.round((area.x + area.width - strip.x) * px_per_mm))
  const top = Math.max(0, Math.round((area.y - strip.y) * px_per_mm))
  const low = Math.min(height, Math.round((area.y + area.height - strip.y) * px_per_mm))
  for (let row = top; row < low; row++) {
    for (let i = row * width + left; i < row * width + right; i++) if (darkness[i]! < paler) darkness[i] = 0
  }
}

/** Where the printed points, colons and hyphens stand (as server/print draws them), mm. */
function marksOf(cell: CombCell): Box[] {
  return layComb(cell).separators.flatMap(({ x, y, mark }) => {
    const [halfWidth, halfHeight] = mark === '-' ? HYPHEN_MM : DOT_MM
    const heights = mark === '.' ? [BOX.height - 0.7] : mark === ':' ? [2.2, BOX.height - 2.2] : [BOX.height / 2]
    return heights.map((at) => ({ x: x - halfWidth, y: y + at - halfHeight, width: 2 * halfWidth, height: 2 * halfHeight }))
  })
}

function blankMarks(strip: Strip): void {
  for (const mark of marksOf(strip.cell)) fill(strip, mark, Number.POSITIVE_INFINITY)
}

/** Whether a printed mark, taken away, has taken a part of what stands in this rectangle (pixels) with it: ink ends at its edge. */
export function isCut(strip: Strip, glyph: { left: number; right: number; top: number; low: number }): boolean {
  const { width, height, px_per_mm, darkness, ink } = strip
  return marksOf(strip.cell).some((mark) => {
    const left = Math.round((mark.x - strip.x) * px_per_mm) - 1
    const right = Math.round((mark.x + mark.width - strip.x) * px_per_mm)
    const top = Math.round((mark.y - strip.y) * px_per_mm) - 1
    const low = Math.round((mark.y + mark.height - strip.y) * px_per_mm)
    for (let y = Math.max(top, glyph.top); y <= Math.min(low, glyph.low - 1, height - 1); y++) {
      for (let x = Math.max(left, glyph.left); x <= Math.min(right, glyph.right - 1, width - 1); x++) {
        const onEdge = x === left || x === right || y === top || y === low
        if (onEdge && darkness[y * width + x]! >= EDGE_INK * ink) return true
      }
    }
    return false
  })
}

function blankFrames(strip: Strip): void {
  const reach = FRAME_REACH_MM
  const paler = FRAME_PALER * strip.ink
  for (const { x, y, width, height } of boxesOf(strip.cell)) {
    for (const edge of [x, x + width]) fill(strip, { x: edge - reach, y: y - 1, width: 2 * reach, height: height + 2 }, paler)
    for (const edge of [y, y + height]) fill(strip, { x, y: edge - reach, width, height: 2 * reach }, paler)
  }
}

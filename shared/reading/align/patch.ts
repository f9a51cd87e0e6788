/** A piece of the page, sampled from the photo through a map: darkness on a grid of layout millimetres. */
import type { FieldMap } from '../geometry/page-map.ts'
import type { Grey } from '../pixels/grey.ts'
import type { PaperLevel } from '../pixels/paper.ts'

/** The picture that fields are measured on, and its own perspective (layout mm to px of this picture). */
export interface Picture {
  grey: Grey
  paper: PaperLevel
}

export interface Patch {
  /** Left and top edge, mm. */
  x: number
  y: number
  step_mm: number
  columns: number
  rows: number
  /** 0 paper to 1 black, row by row; NaN outside the picture. */
  darkness: Float32Array
}

const DARKEST_PAPER = 12

/** Samples between pixels; the paper's level is taken from its own coarse map at each place. */
export function samplePatch(
  { grey, paper }: Picture,
  { homography: h, center, displacement: d }: FieldMap,
  area: { x: number; y: number; width: number; height: number },
  step_mm: number,
): Patch {
  const columns = Math.max(1, Math.round(area.width / step_mm))
  const rows = Math.max(1, Math.round(area.height / step_mm))
  const darkness = new Float32Array(columns * rows)
  const { width, height, data } = grey
  const level = paper.level
  const perBlock = 1 / paper.block_px
  for (let row = 0; row < rows; row++) {
    const y = area.y + (row + 0.5) * step_mm
    const v = y - center.y
    for (let column = 0; column < columns; column++) {
      const x = area.x + (column + 0.5) * step_mm
      const u = x - center.x
      const mx = x + d.dx + d.dxx * u + d.dxy * v
      const my = y + d.dy + d.dyx * u + d.dyy * v
      const w = 1 / (h[6]! * mx + h[7]! * my + h[8]!)
      const px = (h[0]! * mx + h[1]! * my + h[2]!) * w - 0.5
      const py = (h[3]! * mx + h[4]! * my + h[5]!) * w - 0.5
      const at = row * columns + column
      if (px < 0 || py < 0 || px >= width - 1 || py >= height - 1) {
        darkness[at] = Number.NaN
        continue
      }
      const x0 = px | 0
      const y0 = py | 0
      const fx = px - x0
      const i = y0 * width + x0
      const top = data[i]! + (data[i + 1]! - data[i]!) * fx
      const bottom = data[i + width]! + (data[i + width + 1]! - data[i + width]!) * fx
      const value = top + (bottom - top) * (py - y0)
      const bx = Math.min(Math.max(px * perBlock - 0.5, 0), level.width - 1.001)
      const by = Math.min(Math.max(py * perBlock - 0.5, 0), level.height - 1.001)
      const c0 = bx | 0
      const r0 = by | 0
      const gx = bx - c0
      const k = r0 * level.width + c0
      const upper = level.data[k]! + (level.data[k + 1]! - level.data[k]!) * gx
      const lower = level.data[k + level.width]! + (level.data[k + level.width + 1]! - level.data[k + level.width]!) * gx
      const white = Math.max(DARKEST_PAPER, upper + (lower - upper) * (by - r0))
      darkness[at] = Math.min(1, Math.max(0, 1 - value / white))
    }
  }
  return { x: area.x, y: area.y, step_mm, columns, rows, darkness }
}

const BINS = 48

/**
 * One value a column (or a row): the darkness that at least `share` of its cells reach. A printed line reaches all along,
 * a stroke of writing only in places. Darkness over `clip` counts as `clip`, so that pens do not outshout pale frames.
 */
export function lineProfile(
  patch: Patch,
  along: 'columns' | 'rows',
  from_mm: number,
  to_mm: number,
  share: number,
  clip: number,
  use?: (other_mm: number) => boolean,
): Float32Array {
  const { columns, rows, step_mm, darkness } = patch
  const count = along === 'columns' ? columns : rows
  const across = along === 'columns' ? rows : columns
  const origin = along === 'columns' ? patch.y : patch.x
  const picked: number[] = []
  for (let i = 0; i < across; i++) {
    const mm = origin + (i + 0.5) * step_mm
    if (mm >= from_mm && mm <= to_mm && (!use || use(mm))) picked.push(i)
  }
  const profile = new Float32Array(count)
  const bins = new Uint16Array(BINS)
  for (let i = 0; i < count; i++) {
    bins.fill(0)
    let seen = 0
    for (const j of picked) {
      const value = darkness[along === 'columns' ? j * columns + i : i * columns + j]!
      if (Number.isNaN(value)) continue
      bins[Math.min(BINS - 1, ((value / clip) * (BINS - 1) + 0.5) | 0)]!++
      seen++
    }
    if (seen === 0 || seen < picked.length / 2) continue
    let left = seen * share
    let bin = BINS - 1
    while (bin > 0 && left > bins[bin]!) left -= bins[bin--]!
    profile[i] = (bin / (BINS - 1)) * clip
  }
  return profile
}

/** A piece of the page, sampled from the photo through a map: darkness on a grid of layout millimetres. */
import type { FieldMap } from '../geometry/page-map.ts'
import type { Grey } from '../pixels/grey.ts'
import type { PaperLevel } from '../pixels/paper.ts'

/** The picture that fields are measured on. */
export interface Picture {
  grey: Grey
  paper: PaperLevel
  /** Its pixels a pixel of the maps it is sampled through, where those are of a larger picture. */
  shrunk?: number
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
/** Samples between two places that are worked out in full: about 1.5 mm, over which perspective and paper run straight. */
const KNOT = 8

/** Where a sample stands in the picture (pixel middles at whole numbers), and what one grey level of darkness is worth there. */
interface Knot {
  px: number
  py: number
  perWhite: number
}

/** Works out knots of one patch: the map in full, and the paper's level from its own coarse map. */
function knotsOf({ paper, shrunk = 1 }: Picture, { homography: h, center, displacement: d }: FieldMap) {
  const { width, height, data } = paper.level
  const perBlock = 1 / paper.block_px
  return (x: number, y: number, into: Knot): void => {
    const u = x - center.x
    const v = y - center.y
    const mx = x + d.dx + d.dxx * u + d.dxy * v
    const my = y + d.dy + d.dyx * u + d.dyy * v
    const w = shrunk / (h[6]! * mx + h[7]! * my + h[8]!)
    const px = (h[0]! * mx + h[1]! * my + h[2]!) * w - 0.5
    const py = (h[3]! * mx + h[4]! * my + h[5]!) * w - 0.5
    const bx = Math.min(Math.max(px * perBlock - 0.5, 0), width - 1.001)
    const by = Math.min(Math.max(py * perBlock - 0.5, 0), height - 1.001)
    const column = bx | 0
    const k = (by | 0) * width + column
    const fx = bx - column
    const upper = data[k]! + (data[k + 1]! - data[k]!) * fx
    const lower = data[k + width]! + (data[k + width + 1]! - data[k + width]!) * fx
    into.px = px
    into.py = py
    into.perWhite = 1 / Math.max(DARKEST_PAPER, upper + (lower - upper) * (by - (by | 0)))
  }
}

/** Samples between pixels. */
export function samplePatch(
  picture: Picture,
  map: FieldMap,
  area: { x: number; y: number; width: number; height: number },
  step_mm: number,
): Patch {
  const columns = Math.max(1, Math.round(area.width / step_mm))
  const rows = Math.max(1, Math.round(area.height / step_mm))
  const darkness = new Float32Array(columns * rows)
  const { width, data } = picture.grey
  const [right, bottom] = [width - 1, picture.grey.height - 1]
  const knot = knotsOf(picture, map)
  const to: Knot = { px: 0, py: 0, perWhite: 0 }
  for (let row = 0; row < rows; row++) {
    const y = area.y + (row + 0.5) * step_mm
    knot(area.x + 0.5 * step_mm, y, to)
    for (let start = 0; start < columns; start += KNOT) {
      let { px, py, perWhite } = to
      knot(area.x + (start + KNOT + 0.5) * step_mm, y, to)
      const dx = (to.px - px) / KNOT
      const dy = (to.py - py) / KNOT
      const dw = (to.perWhite - perWhite) / KNOT
      const last = row * columns + Math.min(columns, start + KNOT)
      for (let at = row * columns + start; at < last; at++, px += dx, py += dy, perWhite += dw) {
        if (!(px >= 0 && py >= 0 && px < right && py < bottom)) {
          darkness[at] = Number.NaN
          continue
        }
        const x0 = px | 0
        const y0 = py | 0
        const fx = px - x0
        const i = y0 * width + x0
        const top = data[i]! + (data[i + 1]! - data[i]!) * fx
        const low = data[i + width]! + (data[i + width + 1]! - data[i + width]!) * fx
        const dark = 1 - (top + (low - top) * (py - y0)) * perWhite
        darkness[at] = Math.min(1, Math.max(0, dark))
      }
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
  { columns, rows, x, y, step_mm, darkness }: Patch,
  along: 'columns' | 'rows',
  from_mm: number,
  to_mm: number,
  share: number,
  clip: number,
): Float32Array {
  const [count, across, origin] = along === 'columns' ? [columns, rows, y] : [rows, columns, x]
  const [step, stride] = along === 'columns' ? [1, columns] : [columns, 1]
  const first = Math.max(0, Math.ceil((from_mm - origin) / step_mm - 0.5))
  const last = Math.min(across - 1, Math.floor((to_mm - origin) / step_mm - 0.5))
  const profile = new Float32Array(count)
  const bins = new Uint16Array(BINS)
  const perBin = (BINS - 1) / clip
  for (let i = 0; i < count; i++) {
    bins.fill(0)
    let seen = 0
    for (let at = i * step + first * stride, end = i * step + last * stride; at <= end; at += stride) {
      const value = darkness[at]!
      // Outside the picture there is nothing to count.
      if (!(value >= 0)) continue
      bins[value >= clip ? BINS - 1 : (value * perBin + 0.5) | 0]!++
      seen++
    }
    if (seen === 0 || seen < (last - first + 1) / 2) continue
    // From the bright end, where most cells are.
    let paler = seen * (1 - share) - bins[0]!
    let bin = 0
    while (paler >= 0 && bin < BINS - 1) paler -= bins[++bin]!
    profile[i] = bin / perBin
  }
  return profile
}

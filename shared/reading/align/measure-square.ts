/** Where a solid square is: the dark block with white on all sides, then its edges to a fraction of a pixel. */
import type { FieldMap } from '../geometry/page-map.ts'
import { type Picture, samplePatch } from './patch.ts'

export interface SquareFit {
  dx: number
  dy: number
  /** Darkness inside, 0 to 1. */
  inside: number
  /** Width of its edges from light to dark, mm: how sharp the picture is. */
  edge_mm: number
}

const STEP_MM = 0.25
const RING_MM = 0.9
/** Less contrast than this is no square. */
const LEAST_CONTRAST = 0.3

export function measureSquare(
  picture: Picture,
  map: FieldMap,
  square: { x: number; y: number; size: number },
  reach_mm: number,
): SquareFit | null {
  const around = reach_mm + RING_MM + 0.6
  const side = square.size + 2 * around
  const patch = samplePatch(picture, map, { x: square.x - around, y: square.y - around, width: side, height: side }, STEP_MM)
  const n = patch.columns
  const sums = new Float64Array((n + 1) * (n + 1))
  for (let y = 0; y < n; y++) {
    let row = 0
    for (let x = 0; x < n; x++) {
      const value = patch.darkness[y * n + x]!
      // Outside the picture counts as dark: no square is cut by its edge.
      row += Number.isNaN(value) ? 1 : value
      sums[(y + 1) * (n + 1) + x + 1] = sums[y * (n + 1) + x + 1]! + row
    }
  }
  const mean = (x0: number, y0: number, x1: number, y1: number) =>
    (sums[y1 * (n + 1) + x1]! - sums[y0 * (n + 1) + x1]! - sums[y1 * (n + 1) + x0]! + sums[y0 * (n + 1) + x0]!) /
    ((x1 - x0) * (y1 - y0))
  const size = Math.round(square.size / STEP_MM)
  const ring = Math.round(RING_MM / STEP_MM)
  const gap = 1
  let best = { contrast: 0, inside: 0, x: 0, y: 0 }
  for (let y = ring + gap; y + size + ring + gap <= n; y++) {
    for (let x = ring + gap; x + size + ring + gap <= n; x++) {
      const inside = mean(x + 1, y + 1, x + size - 1, y + size - 1)
      if (inside < best.contrast) continue
      const outside = Math.max(
        mean(x - gap - ring, y, x - gap, y + size),
        mean(x + size + gap, y, x + size + gap + ring, y + size),
        mean(x, y - gap - ring, x + size, y - gap),
        mean(x, y + size + gap, x + size, y + size + gap + ring),
      )
      if (inside - outside > best.contrast) best = { contrast: inside - outside, inside, x, y }
    }
  }
  if (best.contrast < LEAST_CONTRAST) return null
  const x = edges((i) => mean(i, best.y + 4, i + 1, best.y + size - 4), best.x, size, ring + gap)
  const y = edges((i) => mean(best.x + 4, i, best.x + size - 4, i + 1), best.y, size, ring + gap)
  if (!x || !y) return null
  return {
    dx: x.middle * STEP_MM - around - square.size / 2,
    dy: y.middle * STEP_MM - around - square.size / 2,
    inside: best.inside,
    edge_mm: ((x.width + y.width) / 2) * STEP_MM,
  }
}

/** Both edges of a dark run where the profile crosses half of its height, in samples. */
function edges(at: (i: number) => number, start: number, size: number, beside: number) {
  const dark = at(start + (size >> 1))
  const crossing = (edge: number, direction: 1 | -1, level: number): number | null => {
    const from = direction > 0 ? edge - beside : edge + beside - 1
    for (let k = 0; k < 2 * beside; k++) {
      const i = from + direction * k
      const a = at(i)
      const b = at(i + direction)
      if (a <= level && b > level) return i + 0.5 + (direction * (level - a)) / (b - a)
    }
    return null
  }
  const light = (edge: number, direction: 1 | -1) => at(direction > 0 ? edge - beside : edge + beside - 1)
  const left = light(start, 1)
  const right = light(start + size, -1)
  const find = (edge: number, direction: 1 | -1, paper: number, share: number) =>
    crossing(edge, direction, paper + (dark - paper) * share)
  const a = find(start, 1, left, 0.5)
  const b = find(start + size, -1, right, 0.5)
  const low = find(start, 1, left, 0.2)
  const high = find(start, 1, left, 0.8)
  if (a === null || b === null) return null
  return { middle: (a + b) / 2, width: low === null || high === null ? 2 * beside : Math.abs(high - low) }
}

/**
 * What is left between the flat-page perspective and the real, curled page: known at anchors, wanted in between.
 * Moving least squares with a local affine: near anchors weigh most, so waves are followed that a polynomial cannot follow.
 */
import type { Point } from '../pixels/grey.ts'
import { solve } from './linear.ts'

export interface Anchor {
  /** Place on the layout, mm. */
  x: number
  y: number
  /** Measured minus expected, mm. */
  dx: number
  dy: number
  weight: number
  /** A line across the page tells how high it stands, and nothing of left and right. */
  onlyDown?: true
}

/** A displacement and how it changes: d(p) = (dx, dy) + (dxx, dyx)(p.x - x) + (dxy, dyy)(p.y - y). */
export interface Displacement {
  dx: number
  dy: number
  dxx: number
  dxy: number
  dyx: number
  dyy: number
}

/** Distance under which anchors are equally near, mm: about a field's size, so that no single one rules its place. */
const NEAR_MM = 9
/** Draws slopes to zero where anchors do not fix them. */
const SLOPE_RIDGE_MM2 = 6

/** Sums of one moving least squares: weights, places, and the values wanted. */
class LocalFit {
  private s = 0
  private sx = 0
  private sy = 0
  private sxx = 0
  private sxy = 0
  private syy = 0
  private v = 0
  private vx = 0
  private vy = 0

  add(w: number, x: number, y: number, value: number): void {
    this.s += w
    this.sx += w * x
    this.sy += w * y
    this.sxx += w * x * x
    this.sxy += w * x * y
    this.syy += w * y * y
    this.v += w * value
    this.vx += w * x * value
    this.vy += w * y * value
  }

  /** Value and both slopes at the middle. */
  solve(): ArrayLike<number> {
    if (this.s === 0) return [0, 0, 0]
    const k = 1 / this.s
    const [mx, my] = [this.sx * k, this.sy * k]
    const xx = this.sxx * k + SLOPE_RIDGE_MM2
    const yy = this.syy * k + SLOPE_RIDGE_MM2
    const matrix = Float64Array.of(1, mx, my, mx, xx, this.sxy * k, my, this.sxy * k, yy)
    return solve(matrix, Float64Array.of(this.v * k, this.vx * k, this.vy * k)) ?? [this.v * k, 0, 0]
  }
}

/** The displacement expected at a place; `skip` leaves anchors out (to check one against its neighbours). */
export function displacementAt(anchors: readonly Anchor[], at: Point, skip?: (anchor: Anchor) => boolean): Displacement {
  const across = new LocalFit()
  const down = new LocalFit()
  for (const anchor of anchors) {
    if (skip?.(anchor)) continue
    const x = anchor.x - at.x
    const y = anchor.y - at.y
    const far = x * x + y * y + NEAR_MM * NEAR_MM
    const w = anchor.weight / (far * far)
    if (!anchor.onlyDown) across.add(w, x, y, anchor.dx)
    down.add(w, x, y, anchor.dy)
  }
  const a = across.solve()
  const b = down.solve()
  return { dx: a[0]!, dxx: a[1]!, dxy: a[2]!, dy: b[0]!, dyx: b[1]!, dyy: b[2]! }
}

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

export const NO_DISPLACEMENT: Displacement = { dx: 0, dy: 0, dxx: 0, dxy: 0, dyx: 0, dyy: 0 }

/** Distance under which anchors are equally near, mm: about a field's size, so that no single one rules its place. */
const NEAR_MM = 9
/** Draws slopes to zero where anchors do not fix them. */
const SLOPE_RIDGE_MM2 = 6

/** The displacement expected at a place; `skip` leaves anchors out (to check one against its neighbours). */
export function displacementAt(anchors: readonly Anchor[], at: Point, skip?: (anchor: Anchor) => boolean): Displacement {
  let s = 0
  let sx = 0
  let sy = 0
  let sxx = 0
  let sxy = 0
  let syy = 0
  let u = 0
  let ux = 0
  let uy = 0
  let v = 0
  let vx = 0
  let vy = 0
  for (const anchor of anchors) {
    if (skip?.(anchor)) continue
    const x = anchor.x - at.x
    const y = anchor.y - at.y
    const far = x * x + y * y + NEAR_MM * NEAR_MM
    const w = anchor.weight / (far * far)
    s += w
    sx += w * x
    sy += w * y
    sxx += w * x * x
    sxy += w * x * y
    syy += w * y * y
    u += w * anchor.dx
    ux += w * x * anchor.dx
    uy += w * y * anchor.dx
    v += w * anchor.dy
    vx += w * x * anchor.dy
    vy += w * y * anchor.dy
  }
  if (s === 0) return NO_DISPLACEMENT
  const ridge = SLOPE_RIDGE_MM2 * s
  const matrix = () => Float64Array.of(s, sx, sy, sx, sxx + ridge, sxy, sy, sxy, syy + ridge)
  const scale = 1 / s
  const a = solve(
    matrix().map((m) => m * scale),
    Float64Array.of(u * scale, ux * scale, uy * scale),
  )
  const b = solve(
    matrix().map((m) => m * scale),
    Float64Array.of(v * scale, vx * scale, vy * scale),
  )
  if (!a || !b) return { ...NO_DISPLACEMENT, dx: u / s, dy: v / s }
  return { dx: a[0]!, dy: b[0]!, dxx: a[1]!, dxy: a[2]!, dyx: b[1]!, dyy: b[2]! }
}

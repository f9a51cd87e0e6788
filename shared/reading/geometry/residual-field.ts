/**
 * What is left between the flat-page perspective and the real, curled page: known at anchors, wanted in between.
 * Moving least squares with a local affine: near anchors weigh most, so waves are followed that a polynomial cannot follow.
 */
import type { Point } from '../pixels/grey.ts'

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
  /** How the displacement changes along x, where the anchor is wide enough to tell; worth so many mm² of spread. */
  slope?: { dxx: number; dyx: number; worth_mm2: number }
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

/** Anchors farther than this weigh nothing beside near ones; they are asked only where there are too few near ones. */
const FAR_MM = 55
const FEW = 12

/** Solves for value and both slopes at the middle from weighted sums. */
function solveAt(s: number, x: number, y: number, xx: number, xy: number, yy: number, v: number, vx: number, vy: number) {
  if (s === 0) return [0, 0, 0] as const
  const k = 1 / s
  const [mx, my, mv] = [x * k, y * k, v * k]
  // Centred on the weighted middle, slopes stand alone.
  const a = xx * k - mx * mx + SLOPE_RIDGE_MM2
  const b = xy * k - mx * my
  const c = yy * k - my * my + SLOPE_RIDGE_MM2
  const p = vx * k - mv * mx
  const q = vy * k - mv * my
  const det = a * c - b * b
  const slopeX = (p * c - q * b) / det
  const slopeY = (q * a - p * b) / det
  return [mv - slopeX * mx - slopeY * my, slopeX, slopeY] as const
}

function fitNear(anchors: readonly Anchor[], at: Point, skip: ((anchor: Anchor) => boolean) | undefined, far2: number) {
  let [s, sx, sy, sxx, sxy, syy, u, ux, uy] = [0, 0, 0, 0, 0, 0, 0, 0, 0]
  let [t, tx, ty, txx, txy, tyy, v, vx, vy] = [0, 0, 0, 0, 0, 0, 0, 0, 0]
  let across = 0
  for (const anchor of anchors) {
    const x = anchor.x - at.x
    const y = anchor.y - at.y
    const distance2 = x * x + y * y
    if (distance2 > far2 || skip?.(anchor)) continue
    const spread = distance2 + NEAR_MM * NEAR_MM
    const w = anchor.weight / (spread * spread)
    const [wx, wy] = [w * x, w * y]
    t += w
    tx += wx
    ty += wy
    txx += wx * x
    txy += wx * y
    tyy += wy * y
    v += w * anchor.dy
    vx += wx * anchor.dy
    vy += wy * anchor.dy
    const { slope } = anchor
    if (slope) {
      txx += w * slope.worth_mm2
      vx += w * slope.worth_mm2 * slope.dyx
      sxx += w * slope.worth_mm2
      ux += w * slope.worth_mm2 * slope.dxx
    }
    if (anchor.onlyDown) continue
    across++
    s += w
    sx += wx
    sy += wy
    sxx += wx * x
    sxy += wx * y
    syy += wy * y
    u += w * anchor.dx
    ux += wx * anchor.dx
    uy += wy * anchor.dx
  }
  const [dx, dxx, dxy] = solveAt(s, sx, sy, sxx, sxy, syy, u, ux, uy)
  const [dy, dyx, dyy] = solveAt(t, tx, ty, txx, txy, tyy, v, vx, vy)
  return { across, displacement: { dx, dxx, dxy, dy, dyx, dyy } }
}

/** The displacement expected at a place; `skip` leaves anchors out (to check one against its neighbours). */
export function displacementAt(anchors: readonly Anchor[], at: Point, skip?: (anchor: Anchor) => boolean): Displacement {
  const near = fitNear(anchors, at, skip, FAR_MM * FAR_MM)
  return near.across >= FEW ? near.displacement : fitNear(anchors, at, skip, Number.POSITIVE_INFINITY).displacement
}

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
  /** Anchors of one group may be left out together: parts of one field do not vouch for each other. */
  group?: string
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

/** Numbers an anchor takes in the packed list: x, y, dx, dy, weight, weight across, slope's worth, dxx, dyx, group. */
const SIZE = 10

/** Anchors packed for asking the displacement at many places. */
export class ResidualField {
  private packed = new Float64Array(64 * SIZE)
  private count = 0
  private readonly groups = new Map<string, number>()

  constructor(anchors: readonly Anchor[]) {
    for (const anchor of anchors) this.add(anchor)
  }

  add({ x, y, dx, dy, weight, onlyDown, slope, group }: Anchor): void {
    if (this.packed.length === this.count * SIZE) {
      const larger = new Float64Array(2 * this.packed.length)
      larger.set(this.packed)
      this.packed = larger
    }
    const across = onlyDown ? 0 : weight
    const own = [x, y, dx, dy, weight, across, slope?.worth_mm2 ?? 0, slope?.dxx ?? 0, slope?.dyx ?? 0, this.groupOf(group)]
    this.packed.set(own, this.count++ * SIZE)
  }

  /**
   * The displacement expected at a place. `without` leaves out the group of that name, or the anchor of that index; `but` is the
   * index of an anchor of that group that counts all the same.
   */
  at(place: Point, without?: string | number, but = -1): Displacement {
    const index = typeof without === 'number' ? without : -1
    const group = typeof without === 'string' ? (this.groups.get(without) ?? -1) : -1
    const near = this.fit(place, FAR_MM * FAR_MM, index, group, but)
    return near.across >= FEW ? near.displacement : this.fit(place, Number.POSITIVE_INFINITY, index, group, but).displacement
  }

  private groupOf(name: string | undefined): number {
    if (name === undefined) return -2
    const known = this.groups.get(name)
    if (known === undefined) this.groups.set(name, this.groups.size)
    return known ?? this.groups.size - 1
  }

  private fit(place: Point, far2: number, index: number, group: number, but: number) {
    let s = 0
    let sx = 0
    let sy = 0
    let sxx = 0
    let sxy = 0
    let syy = 0
    let u = 0
    let ux = 0
    let uy = 0
    let t = 0
    let tx = 0
    let ty = 0
    let txx = 0
    let txy = 0
    let tyy = 0
    let v = 0
    let vx = 0
    let vy = 0
    let across = 0
    const { packed, count } = this
    for (let i = 0, at = 0; i < count; i++, at += SIZE) {
      const x = packed[at]! - place.x
      const y = packed[at + 1]! - place.y
      const distance2 = x * x + y * y
      if (distance2 > far2 || i === index || (packed[at + 9] === group && i !== but)) continue
      const spread = 1 / (distance2 + NEAR_MM * NEAR_MM)
      const w = packed[at + 4]! * spread * spread
      const wx = w * x
      const wy = w * y
      const dy = packed[at + 3]!
      const wide = w * packed[at + 6]!
      t += w
      tx += wx
      ty += wy
      txx += wx * x + wide
      txy += wx * y
      tyy += wy * y
      v += w * dy
      vx += wx * dy + wide * packed[at + 8]!
      vy += wy * dy
      if (packed[at + 5] === 0) continue
      const dx = packed[at + 2]!
      across++
      s += w
      sx += wx
      sy += wy
      sxx += wx * x + wide
      sxy += wx * y
      syy += wy * y
      u += w * dx
      ux += wx * dx + wide * packed[at + 7]!
      uy += wy * dx
    }
    const [dx, dxx, dxy] = solveAt(s, sx, sy, sxx, sxy, syy, u, ux, uy)
    const [dy, dyx, dyy] = solveAt(t, tx, ty, txx, txy, tyy, v, vx, vy)
    return { across, displacement: { dx, dxx, dxy, dy, dyx, dyy } }
  }
}

/** The same for a single place. */
export const displacementAt = (anchors: readonly Anchor[], place: Point): Displacement => new ResidualField(anchors).at(place)

/**
 * A digit of 28 x 28 pixels made fit for 300 dots an inch: enlarged smoothly, set upright by its own moments, and traced to the
 * middle line of its stroke, so that it can be written with any pen width.
 */
import { thin } from './thin.ts'

/** Enlargement before tracing: a stroke is then 8 to 14 pixels wide, enough for a smooth middle line. */
const ENLARGE = 4
/** Neighbourhood that tells a stroke from a blot: 4 pixels of the set wide and high. */
const REACH = 8
/** Share of the neighbourhood that is ink above which a loop has run full: its middle line would be another digit. */
const BLOT = 0.8

export interface Glyph {
  /** Enlarged grey picture, 0 to 1, `side` pixels wide and high. */
  side: number
  grey: Float32Array
  /** Ink bounds in enlarged pixels, after setting upright. */
  bounds: { left: number; top: number; right: number; bottom: number }
  /** Shear (pixels across for a pixel down) that was found in the hand. */
  slant: number
  /** Middle of the ink, in enlarged pixels. */
  centre: { x: number; y: number }
  /** Middle line of the stroke as x, y pairs in enlarged pixels, upright. */
  line: Float32Array
  /** How thick the hand pressed at each point of the line against its own mean, 1 = mean. */
  press: Float32Array
  /** The middle line may not stand for the digit: a loop has run full of ink. */
  blotted: boolean
  /** Mean stroke width in enlarged pixels. */
  stroke: number
}

const cubic = (a: number, b: number, c: number, d: number, t: number) =>
  b + 0.5 * t * (c - a + t * (2 * a - 5 * b + 4 * c - d + t * (3 * (b - c) + d - a)))

/** Rows first, then columns: each with a smooth curve through four neighbours. */
function enlarge(pixels: Uint8Array, from: number): Float32Array {
  const side = from * ENLARGE
  const wide = new Float32Array(side * from)
  for (let y = 0; y < from; y += 1) {
    for (let x = 0; x < side; x += 1) wide[y * side + x] = stretch(pixels, y * from, 1, from, x) / 255
  }
  const out = new Float32Array(side * side)
  for (let x = 0; x < side; x += 1) {
    for (let y = 0; y < side; y += 1) out[y * side + x] = Math.min(1, Math.max(0, stretch(wide, x, side, from, y)))
  }
  return out
}

function stretch(source: ArrayLike<number>, start: number, stride: number, count: number, at: number): number {
  const u = (at + 0.5) / ENLARGE - 0.5
  const u0 = Math.floor(u)
  const a = u0 - 1 < 0 ? 0 : source[start + (u0 - 1) * stride]!
  const b = u0 < 0 ? 0 : source[start + u0 * stride]!
  const c = u0 + 1 >= count ? 0 : source[start + (u0 + 1) * stride]!
  const d = u0 + 2 >= count ? 0 : source[start + (u0 + 2) * stride]!
  return cubic(a, b, c, d, u - u0)
}

function momentsOf(grey: Float32Array, side: number) {
  let mass = 0
  let mx = 0
  let my = 0
  for (let i = 0; i < grey.length; i += 1) {
    mass += grey[i]!
    mx += grey[i]! * (i % side)
    my += grey[i]! * Math.floor(i / side)
  }
  mx /= mass || 1
  my /= mass || 1
  let xy = 0
  let yy = 0
  for (let i = 0; i < grey.length; i += 1) {
    const dy = Math.floor(i / side) - my
    xy += grey[i]! * ((i % side) - mx) * dy
    yy += grey[i]! * dy * dy
  }
  return { x: mx, y: my, slant: Math.max(-0.5, Math.min(0.5, xy / (yy || 1))) }
}

/** Averages each point of the middle line with its neighbours: thinning leaves steps of one pixel. */
function smooth(points: ReadonlyArray<readonly [number, number]>): Array<[number, number]> {
  const reach = 3.2
  return points.map(([x, y]) => {
    let sx = 0
    let sy = 0
    let n = 0
    for (const [u, v] of points) {
      if (Math.abs(u - x) > reach || Math.abs(v - y) > reach) continue
      sx += u
      sy += v
      n += 1
    }
    return [sx / n, sy / n]
  })
}

/** Ink within a few pixels: what a wide stroke has more of than a thin one. */
function massAround(grey: Float32Array, side: number, x: number, y: number): number {
  let mass = 0
  for (let v = Math.max(0, y - REACH); v <= Math.min(side - 1, y + REACH); v += 1) {
    for (let u = Math.max(0, x - REACH); u <= Math.min(side - 1, x + REACH); u += 1) mass += grey[v * side + u]!
  }
  return mass
}

/** Makes a glyph of a digit picture (0 paper, 255 ink). */
export function glyphOf(pixels: Uint8Array, from: number): Glyph {
  const side = from * ENLARGE
  const grey = enlarge(pixels, from)
  const { x: cx, y: cy, slant } = momentsOf(grey, side)
  const traced = smooth(
    thin(
      Uint8Array.from(grey, (v) => (v > 0.45 ? 1 : 0)),
      side,
    ),
  )
  const line = new Float32Array(traced.length * 2)
  const bounds = { left: side, top: side, right: 0, bottom: 0 }
  traced.forEach(([x, y], i) => {
    const upright = x - slant * (y - cy)
    line[2 * i] = upright
    line[2 * i + 1] = y
    bounds.left = Math.min(bounds.left, upright)
    bounds.right = Math.max(bounds.right, upright)
    bounds.top = Math.min(bounds.top, y)
    bounds.bottom = Math.max(bounds.bottom, y)
  })
  const thickness = traced.map(([x, y]) => massAround(grey, side, Math.round(x), Math.round(y)))
  const usual = thickness.reduce((sum, v) => sum + v, 0) / (thickness.length || 1) || 1
  const area = grey.reduce((sum, v) => sum + v, 0)
  const press = Float32Array.from(thickness, (v) => v / usual)
  return {
    side,
    grey,
    bounds,
    slant,
    centre: { x: cx, y: cy },
    line,
    press,
    blotted: Math.max(...thickness) > BLOT * (2 * REACH + 1) ** 2,
    stroke: area / (traced.length || 1),
  }
}

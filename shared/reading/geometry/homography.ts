/** Perspective between two planes, as nine numbers row by row. */
import type { Point } from '../pixels/grey.ts'
import { LeastSquares } from './linear.ts'

export type Homography = readonly number[]

export interface Pair {
  from: Point
  to: Point
  weight?: number
}

export function project(h: Homography, x: number, y: number): Point {
  const w = h[6]! * x + h[7]! * y + h[8]!
  return { x: (h[0]! * x + h[1]! * y + h[2]!) / w, y: (h[3]! * x + h[4]! * y + h[5]!) / w }
}

export function multiply(a: Homography, b: Homography): Homography {
  return Array.from({ length: 9 }, (_, i) => {
    const row = 3 * Math.floor(i / 3)
    const column = i % 3
    return a[row]! * b[column]! + a[row + 1]! * b[column + 3]! + a[row + 2]! * b[column + 6]!
  })
}

export function invert(h: Homography): Homography {
  const [a, b, c, d, e, f, g, i, j] = h as [number, number, number, number, number, number, number, number, number]
  const inverse = [
    e * j - f * i,
    c * i - b * j,
    b * f - c * e,
    f * g - d * j,
    a * j - c * g,
    c * d - a * f,
    d * i - e * g,
    b * g - a * i,
    a * e - b * d,
  ]
  const scale = 1 / (inverse[8] || 1)
  return inverse.map((v) => v * scale)
}

/** Brings points to mean 0 and spread 1, without which the equations lose half of their digits. */
function normaliser(points: readonly Point[]): Homography {
  const n = points.length
  const mx = points.reduce((s, p) => s + p.x, 0) / n
  const my = points.reduce((s, p) => s + p.y, 0) / n
  const spread = Math.sqrt(points.reduce((s, p) => s + (p.x - mx) ** 2 + (p.y - my) ** 2, 0) / n) || 1
  return [1 / spread, 0, -mx / spread, 0, 1 / spread, -my / spread, 0, 0, 1]
}

/** Fits at least four pairs by (algebraic) least squares; null when they do not span a plane. */
export function fitHomography(pairs: readonly Pair[]): Homography | null {
  if (pairs.length < 4) return null
  const before = normaliser(pairs.map((p) => p.from))
  const after = normaliser(pairs.map((p) => p.to))
  const system = new LeastSquares(8)
  for (const { from, to, weight = 1 } of pairs) {
    const { x, y } = project(before, from.x, from.y)
    const t = project(after, to.x, to.y)
    system.add([x, y, 1, 0, 0, 0, -t.x * x, -t.x * y], t.x, weight)
    system.add([0, 0, 0, x, y, 1, -t.y * x, -t.y * y], t.y, weight)
  }
  const solved = system.solve()
  if (!solved) return null
  const h = multiply(invert(after), multiply([...solved, 1], before))
  return h.map((v) => v / h[8]!)
}

/** Pixels a millimetre at a place: the square root of how much areas grow. */
export function scaleAt(h: Homography, x: number, y: number): number {
  const p = project(h, x, y)
  const right = project(h, x + 1, y)
  const down = project(h, x, y + 1)
  return Math.sqrt(Math.abs((right.x - p.x) * (down.y - p.y) - (right.y - p.y) * (down.x - p.x)))
}

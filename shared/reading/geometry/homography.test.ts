import fc from 'fast-check'
import { expect, test } from 'vitest'
import { fitHomography, invert, multiply, project, scaleAt } from './homography.ts'

const corner = (x: number, y: number, spread: number) =>
  fc
    .tuple(fc.double({ min: -spread, max: spread, noNaN: true }), fc.double({ min: -spread, max: spread, noNaN: true }))
    .map(([dx, dy]) => ({
      x: x + dx,
      y: y + dy,
    }))
/** A page seen from some angle: each corner up to a fifth of the picture from its own. */
const view = fc.tuple(corner(300, 300, 250), corner(2700, 300, 250), corner(2700, 3700, 250), corner(300, 3700, 250))
const PAGE = [
  { x: 0, y: 0 },
  { x: 210, y: 0 },
  { x: 210, y: 297 },
  { x: 0, y: 297 },
]

test('a perspective is found again from where it takes points, and its inverse takes them back', () => {
  fc.assert(
    fc.property(view, (corners) => {
      const h = fitHomography(PAGE.map((from, i) => ({ from, to: corners[i]! })))!
      const many = Array.from({ length: 20 }, (_, i) => ({ x: 10 * i, y: (i * 83) % 297 }))
      const again = fitHomography(many.map((from) => ({ from, to: project(h, from.x, from.y) })))!
      for (const p of many) {
        const to = project(h, p.x, p.y)
        const other = project(again, p.x, p.y)
        expect(Math.hypot(other.x - to.x, other.y - to.y)).toBeLessThan(1e-5)
        const back = project(invert(h), to.x, to.y)
        expect(Math.hypot(back.x - p.x, back.y - p.y)).toBeLessThan(1e-6)
      }
    }),
  )
})

test('points on one line span no page', () => {
  const line = [0, 1, 2, 3].map((x) => ({ from: { x, y: 2 * x }, to: { x: 5 * x, y: x } }))
  expect(fitHomography(line)).toBeNull()
  expect(fitHomography(line.slice(0, 3))).toBeNull()
})

test('perspectives follow each other, and the scale is that of areas', () => {
  const twice = [2, 0, 0, 0, 2, 0, 0, 0, 1]
  const moved = [1, 0, 30, 0, 1, -4, 0, 0, 1]
  expect(project(multiply(moved, twice), 10, 10)).toEqual({ x: 50, y: 16 })
  expect(scaleAt(multiply(moved, twice), 100, 100)).toBeCloseTo(2, 9)
})

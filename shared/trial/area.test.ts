import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  quadrilateralByAc,
  quadrilateralByBd,
  quadrilateralByBoth,
  rectangleArea,
  smallestAngle_deg,
  stripArea,
  triangleArea,
} from './area.ts'
import { metres as m } from './quantity.ts'

const quad = (ab: number, bc: number, cd: number, da: number) => ({ ab: m(ab), bc: m(bc), cd: m(cd), da: m(da) })

describe('areas from tape lengths', () => {
  // C05: geometry.
  it('of triangles by their sides', () => {
    expect(triangleArea(m(3), m(4), m(5))).toBe(6)
    expect(triangleArea(m(13), m(14), m(15))).toBe(84)
  })

  it('of the golden plot and its passes', () => {
    expect(rectangleArea(m(60), m(45))).toBe(2700)
    expect(stripArea(50, m(0.905), m(60))).toBeCloseTo(2715, 10)
  })

  // C06: four pegged sides with both diagonals.
  it('by either diagonal, and by both (Bretschneider)', () => {
    const sides = quad(62.07, 44.14, 61.1, 43.57)
    expect(quadrilateralByAc(sides, m(75.04))).toBeCloseTo(2700.288785666263, 9)
    expect(quadrilateralByBd(sides, m(76.16))).toBeCloseTo(2700.288656179291, 9)
    expect(quadrilateralByBoth(sides, m(75.04), m(76.16))).toBeCloseTo(2700.29312067625, 9)
  })

  // E10: NCERT solution pages, shaalaa. Right angle at C, so the diagonal B–D is 13 m.
  it('of published quadrilaterals', () => {
    expect(quadrilateralByBd(quad(9, 12, 5, 8), m(13))).toBeCloseTo(30 + Math.sqrt(1260), 10)
    // 15 and 20 on one side of the diagonal of 25, 26 and 17 on the other.
    expect(quadrilateralByAc(quad(15, 20, 26, 17), m(25))).toBeCloseTo(354, 10)
  })

  it('are none where the sides cannot close', () => {
    expect(triangleArea(m(1), m(2), m(3))).toBeNull()
    expect(triangleArea(m(1), m(2), m(4))).toBeNull()
    expect(quadrilateralByAc(quad(10, 10, 10, 10), m(20))).toBeNull()
    expect(quadrilateralByBoth(quad(1, 100, 1, 100), m(1), m(1))).toBeNull()
  })

  it('keep their digits in a needle of a triangle', () => {
    // An isosceles needle: base 1e-4 m on legs of 100 m has area ½·b·√(100² − (b/2)²).
    expect(triangleArea(m(100), m(100), m(1e-4))).toBeCloseTo(0.5 * 1e-4 * Math.sqrt(100 ** 2 - 0.5e-4 ** 2), 14)
  })

  it('know the smallest angle', () => {
    expect(smallestAngle_deg(m(3), m(4), m(5))).toBeCloseTo(36.869897645844, 9)
    expect(smallestAngle_deg(m(1), m(1), m(1))).toBeCloseTo(60, 9)
    expect(smallestAngle_deg(m(1), m(2), m(4))).toBeNull()
  })
})

describe('properties of areas', () => {
  const length = fc.double({ min: 2, max: 500, noNaN: true })

  it('two sides and the diagonal of a rectangle make half of it, in any order', () => {
    fc.assert(
      fc.property(length, length, (a, b) => {
        const d = Math.hypot(a, b)
        for (const order of [
          [a, b, d],
          [d, a, b],
          [b, d, a],
        ] as const) {
          expect((triangleArea(m(order[0]), m(order[1]), m(order[2])) ?? 0) / (a * b)).toBeCloseTo(0.5, 7)
        }
      }),
    )
  })

  it('scale with the square of the tape', () => {
    fc.assert(
      fc.property(length, length, fc.double({ min: 0.1, max: 10, noNaN: true }), (a, b, k) => {
        const c = Math.max(a, b) * 0.9 + Math.abs(a - b) * 0.1 + Math.min(a, b) * 0.05
        const small = triangleArea(m(a), m(b), m(c))
        const large = triangleArea(m(a * k), m(b * k), m(c * k))
        if (small === null || small < 1e-6) return
        expect((large ?? 0) / small / k ** 2).toBeCloseTo(1, 6)
      }),
    )
  })

  it('a plot grows with its length and with its breadth', () => {
    fc.assert(
      fc.property(length, length, fc.double({ min: 0.01, max: 50, noNaN: true }), (a, b, more) => {
        expect(rectangleArea(m(a + more), m(b))).toBeGreaterThan(rectangleArea(m(a), m(b)))
        expect(rectangleArea(m(a), m(b + more))).toBeGreaterThan(rectangleArea(m(a), m(b)))
      }),
    )
  })
})

import fc from 'fast-check'
import { describe, expect, expectTypeOf, it } from 'vitest'
import { UserError } from '../errors.ts'
import { quadrilateralByAc, quadrilateralByBd, quadrilateralByBoth, rectangleArea, triangleArea } from './area.ts'
import { fuelPerHour } from './fuel.ts'
import { convert, hours, metres, ml, type Quantity, quantity, type UnitName, unitFromTick } from './quantity.ts'

const GROUPS: ReadonlyArray<readonly UnitName[]> = [
  ['m', 'cm', 'mm', 'ft', 'in'],
  ['m2', 'ha', 'acre'],
  ['L', 'mL', 'm3', 'us_gal', 'imp_gal'],
  ['h', 'min', 's'],
  ['km/h', 'm/s', 'mile/h'],
  ['kPa', 'bar', 'psi', 'kgf/cm2'],
  ['kW', 'hp', 'metric_hp'],
  ['kg/m3', 'g/mL'],
  ['L/ha', 'L/acre', 'us_gal/acre'],
]
const amount = fc.double({ min: 1e-3, max: 1e6, noNaN: true })
const turned = convert as unknown as (value: number, from: UnitName, to: UnitName) => number

describe('units', () => {
  it('go to any other of their kind and back without loss', () => {
    const pair = fc.constantFrom(...GROUPS).chain((group) => fc.tuple(fc.constantFrom(...group), fc.constantFrom(...group)))
    fc.assert(
      fc.property(amount, pair, (x, [from, to]) => {
        expect(turned(turned(x, from, to), to, from) / x).toBeCloseTo(1, 12)
      }),
    )
  })

  it('go by way of a third as they go directly', () => {
    const three = fc
      .constantFrom(...GROUPS)
      .chain((g) => fc.tuple(fc.constantFrom(...g), fc.constantFrom(...g), fc.constantFrom(...g)))
    fc.assert(
      fc.property(amount, three, (x, [a, b, c]) => {
        expect(turned(turned(x, a, b), b, c) / turned(x, a, c)).toBeCloseTo(1, 12)
      }),
    )
  })

  it('of another kind do not compile, and throw where they arrive untyped', () => {
    // @ts-expect-error a length is no area
    expect(() => convert(metres(1), 'm', 'ha')).toThrow(/m measures length, ha area/)
    // @ts-expect-error minutes are no hours
    fuelPerHour(ml(1), quantity(60, 'min'))
    // @ts-expect-error a plain number has no unit
    fuelPerHour(ml(1), 1)
    expectTypeOf(fuelPerHour(ml(1), hours(1))).toEqualTypeOf<Quantity<'L/h'>>()
  })

  it('on paper are refused with the ones that are known', () => {
    expect(() => unitFromTick('area', 'bigha')).toThrow(UserError)
    expect(() => unitFromTick('power', 'horses')).toThrow('"horses" is no unit of power: one of kW, hp, metric_hp is needed')
  })
})

const side = fc.double({ min: 1, max: 1000, noNaN: true })
const point = fc.tuple(fc.double({ min: 0, max: 300, noNaN: true }), fc.double({ min: 0, max: 300, noNaN: true }))
type Point = readonly [number, number]
const far = ([ax, ay]: Point, [bx, by]: Point) => metres(Math.hypot(ax - bx, ay - by))
/** Area of a polygon by its corners (shoelace): another way to the same area. */
const shoelace = (corners: readonly Point[]) =>
  Math.abs(
    corners.reduce(
      (sum, [x, y], i) =>
        sum + x * (corners[(i + 1) % corners.length]?.[1] ?? 0) - y * (corners[(i + 1) % corners.length]?.[0] ?? 0),
      0,
    ),
  ) / 2

describe('areas', () => {
  it('of a triangle by its sides is that by its corners', () => {
    fc.assert(
      fc.property(point, point, point, (a, b, c) => {
        const exact = shoelace([a, b, c])
        fc.pre(exact > 1)
        expect((triangleArea(far(a, b), far(b, c), far(c, a)) ?? 0) / exact).toBeCloseTo(1, 8)
      }),
    )
  })

  it('do not depend on the order of the sides', () => {
    fc.assert(
      fc.property(side, side, side, (a, b, c) => {
        const areas = [
          [a, b, c],
          [b, c, a],
          [c, b, a],
        ].map(([x = 0, y = 0, z = 0]) => triangleArea(metres(x), metres(y), metres(z)))
        expect(new Set(areas).size).toBe(1)
      }),
    )
  })

  // Kahan's needle: sides 1e5, 1e5 and a short one; the exact area is base × height ÷ 2. Heron as written loses its digits.
  it('keep the digits of a needle', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-4, max: 1, noNaN: true }), (base) => {
        const height = Math.sqrt((1e5 - base / 2) * (1e5 + base / 2))
        expect((triangleArea(metres(1e5), metres(1e5), metres(base)) ?? 0) / ((base * height) / 2)).toBeCloseTo(1, 12)
      }),
    )
  })

  it('of a convex plot are one by either diagonal, by both, and by its corners', () => {
    const corner = (x: number, y: number) =>
      fc.tuple(fc.double({ min: x, max: x + 30, noNaN: true }), fc.double({ min: y, max: y + 30, noNaN: true }))
    fc.assert(
      fc.property(corner(0, 0), corner(100, 0), corner(100, 80), corner(0, 80), (a, b, c, d) => {
        const exact = shoelace([a, b, c, d])
        const sides = { ab: far(a, b), bc: far(b, c), cd: far(c, d), da: far(d, a) }
        expect((quadrilateralByAc(sides, far(a, c)) ?? 0) / exact).toBeCloseTo(1, 9)
        expect((quadrilateralByBd(sides, far(b, d)) ?? 0) / exact).toBeCloseTo(1, 9)
        expect((quadrilateralByBoth(sides, far(a, c), far(b, d)) ?? 0) / exact).toBeCloseTo(1, 9)
      }),
    )
  })

  it('grow with every side of a rectangle', () => {
    fc.assert(
      fc.property(side, side, side, (a, b, more) => {
        expect(rectangleArea(metres(a + more), metres(b))).toBeGreaterThan(rectangleArea(metres(a), metres(b)))
      }),
    )
  })
})

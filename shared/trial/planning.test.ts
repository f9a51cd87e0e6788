import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { buildFacts, buildFullReadings } from '../../tests/builders/readings.ts'
import { computeResults } from './compute-results.ts'
import { leastArea, leastFuel, marksOf } from './planning.ts'

const KIT = { jugMark_ml: 100, scale_pct: 1 }

// The method's table of least fuel, worked out independently from JCGM 100 5.1.6.
describe('least fuel', () => {
  it.each([
    [3, 200, 0, 0, 5898],
    [3, 100, 0, 0, 2949],
    [3, 200, 1, 0.613124, 6977],
    [3, 100, 1, 0.613124, 4028],
    [5, 200, 0, 0, 3357],
    [5, 100, 0, 0, 1678],
    [5, 200, 1, 0.613124, 3679],
    [5, 100, 1, 0.613124, 2124],
    [10, 200, 0, 0, 1644],
    [10, 100, 0, 0, 822],
    [10, 200, 1, 0.613124, 1757],
    [10, 100, 1, 0.613124, 1014],
  ])('± %d %% with marks of %d mL, %d top-ups, area known to %d %%: %d mL', (U_pct, jarStep_ml, topups, area_u_pct, least) => {
    expect(Math.round(leastFuel({ ...KIT, U_pct, jarStep_ml, topups, area_u_pct }) ?? 0)).toBe(least)
  })

  it('is more for a surer figure, coarser marks, more top-ups, and none when the scale alone is less sure', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 2, max: 20, noNaN: true }),
        fc.integer({ min: 20, max: 500 }),
        fc.integer({ min: 0, max: 5 }),
        (U_pct, jarStep_ml, topups) => {
          const at = { ...KIT, U_pct, jarStep_ml, topups, area_u_pct: 0 }
          const least = leastFuel(at) ?? 0
          expect(leastFuel({ ...at, U_pct: U_pct * 1.1 }) ?? 0).toBeLessThan(least)
          expect(leastFuel({ ...at, jarStep_ml: jarStep_ml + 10 }) ?? 0).toBeGreaterThan(least)
          expect(leastFuel({ ...at, topups: topups + 1 }) ?? 0).toBeGreaterThan(least)
        },
      ),
    )
    expect(leastFuel({ ...KIT, U_pct: 1, jarStep_ml: 1, topups: 0, area_u_pct: 0 })).toBeNull()
  })
})

describe('least area', () => {
  const PLOUGH = { ...KIT, jarStep_ml: 200, topups: 1, fuel_l_per_ha: 14.074074, width_m: 0.905, pass_m: 60 }

  it('worked at that U gives back the golden sheet: 2700 m² are known to ± 4.8 %', () => {
    const { l_per_ha } = computeResults(buildFullReadings(), buildFacts())
    const U_pct = (100 * (l_per_ha.U ?? 0)) / (l_per_ha.value ?? 1)
    // The tape, left out of the planning, and the jar's part of the scale make the half percent.
    expect((leastArea({ ...PLOUGH, U_pct }) ?? 0) / 2700).toBeCloseTo(1, 1)
  })

  it('is less where more is burned on a hectare, and more for a wider tool', () => {
    const at = (changes: Partial<typeof PLOUGH>) => leastArea({ ...PLOUGH, U_pct: 5, ...changes }) ?? 0
    expect(at({ fuel_l_per_ha: 28 })).toBeLessThan(at({}))
    expect(at({ width_m: 3 })).toBeGreaterThan(at({}))
    expect(leastArea({ ...PLOUGH, U_pct: 1 })).toBeNull()
  })
})

it('counts whole marks of the jar, upwards', () => {
  expect(marksOf(3357, 200)).toBe(17)
  expect(marksOf(3400, 200)).toBe(17)
})

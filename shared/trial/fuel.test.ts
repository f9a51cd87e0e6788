import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fuelAt15, fuelMass, fuelPerAcre, fuelPerHectare, fuelPerHour, fuelPerSoil, fuelUsed } from './fuel.ts'
import { hours, ml, quantity, squareMetres } from './quantity.ts'
import { densityAt15, expansion, volumeCorrection } from './volume-correction.ts'

const rho = (value: number) => quantity(value, 'kg/m3')
const level = (volume: number, temp_c: number) => ({ volume: ml(volume), temp_c })

// Check values C01 to C04 and C17: the golden sheet, worked out independently to full digits.
describe('fuel by the balance of the jar', () => {
  it('C01: start, plus top-ups, less end', () => {
    expect(fuelUsed(ml(4800), [ml(1000)], ml(2000))).toBe(3800)
    expect(fuelUsed(ml(4800), [], ml(2000))).toBe(2800)
  })

  it('C02: each level corrected at its own temperature', () => {
    expect(fuelAt15(level(4800, 32), [level(1000, 34)], level(2000, 41), rho(832))).toBeCloseTo(3758.16855722427, 8)
  })

  it('C03: per hour, hectare and acre', () => {
    expect(fuelPerHour(ml(3800), hours(52 / 60))).toBeCloseTo(4.384615384615384, 13)
    expect(fuelPerHectare(ml(3800), squareMetres(2700))).toBeCloseTo(14.074074074074073, 13)
    expect(fuelPerAcre(ml(3800), squareMetres(2700))).toBeCloseTo(5.6955757056, 12)
  })

  it('C04: per cubic metre of soil', () => {
    expect(fuelPerSoil(ml(3800), squareMetres(2700), quantity(15.125, 'cm'))).toBeCloseTo(9.305172941536577, 12)
    // The short golden sheet: first 10 depths.
    expect(fuelPerSoil(ml(3800), squareMetres(2700), quantity(15.15, 'cm'))).toBeCloseTo(9.28982, 5)
  })

  it('C17: mass', () => {
    expect(fuelMass(ml(3758.16855722427), rho(832))).toBeCloseTo(3.1267962396105924, 12)
  })

  it('grows with what was poured in and falls with what is left', () => {
    const volume = fc.integer({ min: 0, max: 5000 })
    fc.assert(
      fc.property(
        volume,
        fc.array(volume, { maxLength: 3 }),
        volume,
        fc.integer({ min: 1, max: 1000 }),
        (start, topups, end, more) => {
          const used = fuelUsed(ml(start), topups.map(ml), ml(end))
          expect(fuelUsed(ml(start), [...topups, more].map(ml), ml(end))).toBe(used + more)
          expect(fuelUsed(ml(start), topups.map(ml), ml(end + more))).toBe(used - more)
        },
      ),
    )
  })
})

// C15, C16: ASTM D1250-80 Table 54B/53B, computed independently from the cited formula.
describe('volume correction', () => {
  it.each([
    [835, 40, 0.97855164],
    [840, 30, 0.98729639],
    [832, 32, 0.98533694],
    [832, 41, 0.97752639],
    [845, 40, 0.97894343],
    [860, 20, 0.99590429],
    [832, 5, 1.00856633],
    [832, 34, 0.98360402],
  ])('C15: %d kg/m³ at %d °C', (density, temp, factor) => {
    expect(volumeCorrection(rho(density), temp)).toBeCloseTo(factor, 8)
  })

  it('C16: density at 15 °C from a reading at another temperature', () => {
    expect(densityAt15(rho(820), 35)).toBeCloseTo(834.3224923708985, 6)
    // The glass of a warm hydrometer makes it read a little high.
    expect(densityAt15(rho(820), 35, { glass: true })).toBeLessThan(834.3224923708985)
  })

  it('is exactly 1 at 15 °C, and less the warmer the fuel', () => {
    const density = fc.double({ min: 790, max: 900, noNaN: true })
    fc.assert(
      fc.property(
        density,
        fc.double({ min: -5, max: 79, noNaN: true }),
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        (d, t, step) => {
          expect(volumeCorrection(rho(d), 15)).toBe(1)
          expect(volumeCorrection(rho(d), t + step)).toBeLessThan(volumeCorrection(rho(d), t))
        },
      ),
    )
  })

  it('expands light fuel more than heavy, inside one range of the table', () => {
    fc.assert(
      fc.property(fc.double({ min: 788, max: 838.9, noNaN: true }), fc.double({ min: 788, max: 838.9, noNaN: true }), (a, b) => {
        if (a < b) expect(expansion(rho(a))).toBeGreaterThan(expansion(rho(b)))
      }),
    )
  })

  it('refuses a density in g/mL', () => {
    expect(() => expansion(rho(0.832))).toThrow('written in g/mL?')
  })
})

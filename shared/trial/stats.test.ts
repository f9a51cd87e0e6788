import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { GOLDEN_DEPTHS_CM, GOLDEN_WIDTHS_M } from '../../tests/builders/readings.ts'
import { mean, median, medianDeviation, standardDeviation, typeA, variation_pct } from './stats.ts'

/** Digits two figures share. */
const digits = (got: number, certified: number) =>
  got === certified ? 16 : -Math.log10(Math.abs(got - certified) / Math.abs(certified))
const repeated = (base: number): number[] => [base + 0.2, ...Array.from({ length: 500 }, () => [base + 0.1, base + 0.3]).flat()]

// NIST StRD univariate sets (files as in apache/commons-math's test data).
describe('mean and deviation against NIST StRD', () => {
  it('NumAcc1, exact', () => {
    const values = [10_000_001, 10_000_003, 10_000_002]
    expect(mean(values)).toBe(10_000_002)
    expect(standardDeviation(values)).toBe(1)
  })

  it.each([
    ['NumAcc2', 1, 1.2, 14],
    ['NumAcc3', 1e6, 1_000_000.2, 9],
    // Eight digits before the point leave the data themselves about eight digits of 0.1.
    ['NumAcc4', 1e7, 10_000_000.2, 8],
  ])('%s', (_name, base, certified, kept) => {
    expect(digits(mean(repeated(base)), certified)).toBeGreaterThan(14)
    expect(digits(standardDeviation(repeated(base)) ?? 0, 0.1)).toBeGreaterThan(kept)
  })

  it('Mavro', () => {
    const fifths =
      '180 170 180 190 180 170 150 140 150 150 170 180 180 190 190 210 200 160 140 130 130 150 150 160 150 140 130 140 150 140 150 160 150 160 190 200 200 210 220 230 240 250 270 260 260 260 270 260 250 240'
    const values = fifths.split(' ').map((x) => (200_000 + Number(x)) / 100_000)
    expect(digits(mean(values), 2.001856)).toBeGreaterThan(14)
    expect(digits(standardDeviation(values) ?? 0, 0.000429123454003053)).toBeGreaterThan(11)
  })
})

describe('statistics of repeated readings', () => {
  // C10, golden sheet.
  it('give the golden depths and widths', () => {
    expect(mean(GOLDEN_DEPTHS_CM)).toBe(15.125)
    expect(standardDeviation(GOLDEN_DEPTHS_CM)).toBeCloseTo(0.6858532910485341, 13)
    expect(variation_pct(GOLDEN_DEPTHS_CM)).toBeCloseTo(4.534567213544028, 12)
    expect(typeA(GOLDEN_DEPTHS_CM)).toBeCloseTo(0.153361458137647, 13)
    expect(mean(GOLDEN_WIDTHS_M)).toBeCloseTo(0.905, 15)
    expect(standardDeviation(GOLDEN_WIDTHS_M)).toBeCloseTo(0.015092308563562374, 14)
    expect(variation_pct(GOLDEN_WIDTHS_M)).toBeCloseTo(1.667658404813522, 11)
  })

  // Robust z of 245.57 in the e-Handbook 1.3.5.17.1 list is 29.963, computed in R.
  it('measure a wild value by the middle of the others', () => {
    const list = [199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57]
    expect((0.6745 * (245.57 - median(list))) / medianDeviation(list)).toBeCloseTo(29.963, 3)
  })

  it('claim no spread from a single reading', () => {
    expect(standardDeviation([3])).toBeNull()
    expect(variation_pct([3])).toBeNull()
    expect(typeA([3])).toBeNull()
    expect(() => mean([])).toThrow('at least one value')
  })

  it('do not depend on order, and shift with the readings', () => {
    const list = fc.array(fc.double({ min: 0, max: 100, noNaN: true }), { minLength: 2, maxLength: 30 })
    fc.assert(
      fc.property(list, fc.double({ min: -50, max: 50, noNaN: true }), (values, shift) => {
        const reversed = [...values].reverse()
        expect(mean(reversed)).toBeCloseTo(mean(values), 9)
        expect(mean(values.map((x) => x + shift))).toBeCloseTo(mean(values) + shift, 9)
        expect(standardDeviation(values.map((x) => x + shift)) ?? 0).toBeCloseTo(standardDeviation(values) ?? 0, 6)
      }),
    )
  })
})

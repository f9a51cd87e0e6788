import { describe, expect, it } from 'vitest'
import { soilWater_pct, waterOfWetSoil_pct } from './moisture.ts'
import { grubbsCritical, grubbsDistance, robustZ } from './outliers.ts'
import { incompleteBeta, quantileAbove, upperTail } from './student.ts'

// Quantiles of R 4.2.2 (qt).
describe("Student's t", () => {
  it.each([
    [5, 2.5705818],
    [9, 2.2621572],
    [20, 2.0859634],
  ])('quantile .975 with %d degrees of freedom', (df, t) => {
    expect(quantileAbove(0.025, df)).toBeCloseTo(t, 7)
  })

  // R sleep, paired: t −4.0621276834, df 9, p 0.0028328902; Welch t −1.8608134675, df 17.77647352, p 0.0793941402.
  it('p-values of the sleep data', () => {
    expect(2 * upperTail(4.0621276834, 9)).toBeCloseTo(0.0028328902, 10)
    expect(2 * upperTail(1.8608134675, 17.77647352)).toBeCloseTo(0.0793941402, 9)
  })

  it('holds the plain cases of the beta function', () => {
    // I_x(1, 1) = x; I_x(a, 1) = x^a.
    expect(incompleteBeta(0.3, 1, 1)).toBeCloseTo(0.3, 12)
    expect(incompleteBeta(0.3, 4, 1)).toBeCloseTo(0.3 ** 4, 12)
    expect([incompleteBeta(0, 2, 3), incompleteBeta(1, 2, 3)]).toEqual([0, 1])
    expect(() => quantileAbove(0.7, 5)).toThrow('between 0 and 0.5')
  })
})

// NIST e-Handbook 1.3.5.17.1 (data, mean, G); critical values from R 4.2.2.
describe('outliers', () => {
  const masses = [199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57]

  it.each([
    [6, 1.8871451177839333, 1.9728167175443083],
    [8, 2.1266450871954685, 2.274365127079893],
    [10, 2.2899540844796005, 2.482083249715332],
    [20, 2.708245645805754, 3.0008041573404602],
  ])('Grubbs, two-sided, n = %d at 5 and 1 %%', (n, five, one) => {
    expect(grubbsCritical(n, 0.05)).toBeCloseTo(five, 9)
    expect(grubbsCritical(n, 0.01)).toBeCloseTo(one, 9)
  })

  it('stand out by both measures', () => {
    expect(grubbsDistance(245.57, masses)).toBeCloseTo(2.46876461121245, 9)
    expect(robustZ(245.57, masses)).toBeCloseTo(29.963, 3)
  })

  it('are not sought where nothing spreads', () => {
    expect(grubbsDistance(3, [3, 3, 3])).toBeNull()
    expect(robustZ(3, [3, 3, 3, 4])).toBeNull()
  })
})

describe('soil water', () => {
  // C23; E12: irrigation slides, the 230 g read as with the box.
  it('is a share of the dry soil', () => {
    expect(soilWater_pct(32.4, 148.62, 131.75)).toBeCloseTo(16.98037242073478, 11)
    expect(waterOfWetSoil_pct(32.4, 148.62, 131.75)).toBeCloseTo(14.51557391154707, 11)
    expect(soilWater_pct(78, 230, 204)).toBeCloseTo(20.634920634920636, 11)
  })
})

import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatResult, roundByUncertainty } from './format.ts'

describe('figures for people', () => {
  // Golden sheet: 14.1 ± 0.7 L/ha; 4.38 ± 0.22 L/h, two figures of U because its first is 1 or 2.
  it('are rounded by their uncertainty', () => {
    expect(formatResult(14.074074, 0.67637)).toBe('14.1 ± 0.7')
    expect(formatResult(4.384615, 0.215058)).toBe('4.38 ± 0.22')
    expect(formatResult(3800, 176.574819)).toBe('3800 ± 180')
    expect(formatResult(2700, 33.1087)).toBe('2700 ± 30')
    expect(formatResult(0.905, 0.009545)).toBe('0.905 ± 0.010')
    expect(formatResult(12.765957, 0.6274)).toBe('12.8 ± 0.6')
  })

  it('keep four figures where no uncertainty is known', () => {
    expect(formatResult(4.534567, null)).toBe('4.535')
    expect(formatResult(0, null)).toBe('0.000')
    expect(formatResult(52_000.4, 0)).toBe('52000')
  })

  it('show a dash for no figure and no minus before nought', () => {
    expect(formatResult(null, 1)).toBe('–')
    expect(formatResult(-0.001, 0.5)).toBe('0.0 ± 0.5')
  })

  it('never move a value by more than half of its uncertainty', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e5, max: 1e5, noNaN: true }),
        fc.double({ min: 1e-4, max: 1e4, noNaN: true }),
        (value, U) => {
          expect(Math.abs(Number(roundByUncertainty(value, U).value) - value)).toBeLessThanOrEqual(U / 2 + 1e-9)
        },
      ),
    )
  })
})

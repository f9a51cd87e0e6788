import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { buildFacts, buildOptions, buildReadings } from '../../tests/builders/readings.ts'
import type { Facts } from '../trial/facts.ts'
import type { ReadingValue } from '../trial/readings.ts'
import { LIMITS } from './limits.ts'
import { resultsUnderChecks } from './results-under-checks.ts'

const KEYS = Object.keys(buildReadings())

/** Anything a reader or a person may put in a cell, sensible or not. */
const anyValue: fc.Arbitrary<ReadingValue | undefined> = fc.oneof(
  fc.constantFrom<ReadingValue | undefined>(
    null,
    undefined,
    true,
    false,
    0,
    -1,
    '',
    'ha',
    'psi',
    '09:38',
    '23:59',
    '2026-10-14',
    '9:99',
    'W',
    'L',
  ),
  fc.double({ noNaN: false }),
  fc.integer({ min: -10, max: 9999 }),
  fc.string({ maxLength: 6 }),
)

const anyFacts: fc.Arbitrary<Facts> = fc.record(
  {
    ratedWidth_m: fc.option(fc.double({ min: 0, max: 12, noNaN: true })),
    density15_kgm3: fc.option(fc.double({ min: 0, max: 1200, noNaN: true })),
    ptoPower_kw: fc.option(fc.double({ min: 0, max: 400, noNaN: true })),
    jarMark_ml: fc.option(fc.integer({ min: 1, max: 1000 })),
    operation: fc.constantFrom('plough', 'harrow', null),
  },
  { requiredKeys: [] },
)

describe('whatever stands in the cells', () => {
  it('rules and results answer, with finite figures or a reason, and sentences without holes', () => {
    fc.assert(
      fc.property(fc.dictionary(fc.constantFrom(...KEYS), anyValue, { maxKeys: 12 }), anyFacts, (changes, facts) => {
        const { results, findings } = resultsUnderChecks(buildReadings(changes), { ...buildFacts(), ...facts }, buildOptions())
        for (const r of Object.values(results)) {
          if (r.value === null) expect(r.reason?.text).toMatch(/\.$|\?$/)
          else expect([r.value, r.u ?? 0, r.U ?? 0].every(Number.isFinite)).toBe(true)
        }
        for (const f of findings) expect(f.text).not.toMatch(/undefined|(?<!reads ")NaN/)
      }),
      { numRuns: 300 },
    )
  })

  it('the same sheet gives the same answer', () => {
    fc.assert(
      fc.property(fc.dictionary(fc.constantFrom(...KEYS), anyValue, { maxKeys: 5 }), (changes) => {
        const judge = () => resultsUnderChecks(buildReadings(changes), buildFacts(), buildOptions())
        expect(judge()).toEqual(judge())
      }),
      { numRuns: 30 },
    )
  })
})

describe('the numbers rules compare with', () => {
  it('each say where they come from', () => {
    for (const limit of Object.values(LIMITS)) expect(limit.source).not.toBe('')
  })

  it('leave the golden sheet inside every range', () => {
    for (const [key, info] of Object.entries(buildOptions().cells ?? {})) {
      for (const range of [info.hard, info.plausible]) {
        const value = buildReadings()[key]
        if (range && typeof value === 'number') expect(value >= range[0] && value <= range[1]).toBe(true)
      }
    }
  })
})

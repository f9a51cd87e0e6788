import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { box, comb, one, plain, rules, time, written } from '../../../tests/builders/ink.ts'
import type { Tie } from '../../layouts/tie.ts'
import { BLANK } from '../classes.ts'

describe('one reading', () => {
  it('takes right-aligned digits with leading blanks or zeros as the same number', () => {
    expect(one(comb('a', '9999'), written(' 480'))).toMatchObject({ value: 480, state: 'clear' })
    expect(one(comb('a', '9999'), written('0480'))).toMatchObject({ value: 480, state: 'clear' })
    expect(one(comb('a', '99.9'), written(' 95'))).toMatchObject({ value: 9.5, state: 'clear' })
    expect(one(comb('a', '99.999'), written('  270'))).toMatchObject({ value: 0.27 })
  })

  it('adds up the ink of both ways to write the same number', () => {
    const either = [box({ [BLANK]: 0.5, 0: 0.4999 }), plain(4), plain(8), plain(0)]
    expect(one(comb('a', '9999'), either)).toMatchObject({ value: 480, state: 'clear' })
  })

  it('reads an empty comb as blank', () => {
    expect(one(comb('a', '9999'), written('    '))).toMatchObject({ value: null, state: 'clear' })
  })

  it('doubts a gap between digits and an empty decimal box', () => {
    expect(rules(one(comb('a', '9999'), written('4 80')))).toContain('Q55')
    expect(rules(one(comb('a', '99.9'), written('15 ')))).toContain('Q55')
  })

  it('doubts a crossed-out box', () => {
    const reading = one(comb('a', '9999'), written('48x0'))
    expect(reading.state).toBe('in doubt')
    expect(rules(reading)).toContain('R01')
  })

  it('knows clock and calendar', () => {
    expect(one(time('t'), written('0910'))).toMatchObject({ value: '09:10', state: 'clear' })
    expect(one(time('t'), written(' 910'))).toMatchObject({ value: '09:10', state: 'clear' })
    expect(one(time('t'), written('2910')).state).toBe('in doubt')
    const date = comb('d', '99-99-9999', { kind: 'date' })
    expect(one(date, written('13102026'))).toMatchObject({ value: '2026-10-13', state: 'clear' })
    expect(one(date, written('31022026')).state).toBe('in doubt')
    expect(one(date, written('14102026'), [], { today: '2026-10-13' }).state).toBe('in doubt')
  })

  it('chooses by the clock between two digits that the ink allows', () => {
    // 27:10 is no time, so the second digit is the 1 that the ink holds likely as well.
    expect(one(time('t'), [plain(2), box({ 7: 0.4, 1: 0.5999 }), plain(1), plain(0)])).toMatchObject({
      value: '21:10',
      state: 'clear',
    })
  })

  it('leans on the marks of an instrument, and leaves a broken mark to a person', () => {
    const marks: Tie[] = [{ kind: 'marks', keys: ['jar'], step: 200, half: 100 }]
    const jar = comb('jar', '9999')
    const smudged = [plain(4), plain(8), box({ 0: 0.98, 6: 0.0199 }), plain(0)]
    expect(one(jar, smudged).state).toBe('in doubt')
    expect(one(jar, smudged, marks)).toMatchObject({ value: 4800, state: 'clear' })
    expect(one(jar, written('4810'), marks)).toMatchObject({ value: 4810, state: 'in doubt' })
  })

  it('prefers numbers that the register holds, without inventing ink', () => {
    const cell = comb('kit', '9999', { register: 'kits' })
    const facts = { known: { kits: new Set([31, 37, 112]) } }
    const smudged = [plain(0), plain(0), plain(3), box({ 7: 0.97, 9: 0.0299 })]
    expect(one(cell, smudged).state).toBe('in doubt')
    expect(one(cell, smudged, [], facts)).toMatchObject({ value: 37, state: 'clear' })
    expect(one(cell, written('0039'), [], facts)).toMatchObject({ value: 39 })
  })

  it('puts every comb whose boxes are unsure in doubt, whatever the digits', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 0, max: 9 }), { minLength: 4, maxLength: 4 }),
        fc.nat(3),
        fc.double({ min: 0.3, max: 0.95, noNaN: true }),
        (digits, at, p) => {
          const boxes = digits.map((d, i) => (i === at ? box({ [d]: p, [(d + 1) % 10]: 1 - p - 0.001 }) : plain(d)))
          const reading = one(comb('a', '9999'), boxes)
          expect(reading.state).toBe('in doubt')
          expect(reading.candidates.length).toBeGreaterThan(1)
        },
      ),
      { numRuns: 100 },
    )
  })
})

import { expect, test } from 'vitest'
import { limitProblems, limitRange } from './limit-range.ts'
import { LIMITS, type LimitName } from './limits.ts'

test('every limit as shipped may be set', () => {
  const names = Object.keys(LIMITS) as LimitName[]
  expect(limitProblems({}, names)).toEqual({})
})

test('a limit is not negative unless the shipped one is', () => {
  expect(limitRange('kit_check_months')).toEqual({ least: 0, most: 120 })
  expect(limitProblems({ kit_check_months: -3 }, ['kit_check_months'])).toEqual({
    kit_check_months: 'The kit check months must lie between 0 months and 120 months.',
  })
  expect(limitProblems({ slip_stop_low_pct: -5 }, ['slip_stop_low_pct'])).toEqual({})
})

test('no share is over 100 %', () => {
  expect(limitRange('slip_stop_high_pct').most).toBe(100)
})

test('the low end of a band lies under its high end, whichever of them is changed', () => {
  const says = 'The slip note low, 16 %, must be less than the slip note high, 15 %.'
  expect(limitProblems({ slip_note_low_pct: 16 }, ['slip_note_low_pct'])).toEqual({ slip_note_low_pct: says })
  expect(limitProblems({ slip_note_high_pct: 2 }, ['slip_note_high_pct'])).toHaveProperty('slip_note_high_pct')
  expect(limitProblems({ slip_note_low_pct: 16, slip_note_high_pct: 20 }, ['slip_note_low_pct'])).toEqual({})
})

test('what was set before and is not touched is not asked about', () => {
  expect(limitProblems({ kit_check_months: -3, late_days: 40 }, ['late_days'])).toEqual({})
})

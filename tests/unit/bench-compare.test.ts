import { expect, test } from 'vitest'
import { findLayout } from '../../shared/layouts/registry.ts'
import { scorePage } from '../bench/compare.ts'
import { levelFigures } from '../bench/figures.ts'
import type { OnePage, OneReading } from '../bench/reading-json.ts'
import { tiedKeys } from '../bench/tied.ts'
import type { Truth } from '../simulator/scenario.ts'

const layout = findLayout('tillage', 1)!
const tied = tiedKeys(layout)
const truth: Truth = {
  layout: 'tillage',
  version: 1,
  sheet: 'X',
  level: 'easy',
  readings: {
    jar_start_ml: 4800,
    jar_end_ml: 2000,
    fuel_used_written_ml: 3800,
    gear: 3,
    pass_count: 50,
    diag_bd_m: null,
    vent_open: true,
    air_bled: false,
    area_unit: 'ha',
    remarks: null,
  },
  spoiled: ['gear'],
  wrongSum: ['fuel_used_written_ml'],
}
const clear = (value: OneReading['value']): OneReading => ({ value, state: 'clear' })
const doubt = (value: OneReading['value']): OneReading => ({ value, state: 'in doubt' })
const pageOf = (readings: OnePage['readings']): OnePage => ({ sheet: 'X', takeAgain: null, readings, ms: { decode: 10 } })
const all = {
  jar_start_ml: clear(4800),
  jar_end_ml: doubt(2000),
  fuel_used_written_ml: doubt(3800),
  gear: doubt(null),
  pass_count: clear(50),
  diag_bd_m: clear(null),
  vent_open: clear(true),
  air_bled: clear(false),
  area_unit: clear('ha'),
}
const score = (readings: OnePage['readings']) => scorePage('f', pageOf(readings), truth, layout, tied, null, 100)

test('shares count readings that hold ink, tied, untied and ticks apart, without those made wrong on purpose', () => {
  const s = score(all)
  expect(s.tied).toEqual({ readings: 2, doubts: 1, clear: 1, silent: 0 })
  expect(s.untied).toEqual({ readings: 1, doubts: 0, clear: 1, silent: 0 })
  expect(s.ticks).toEqual({ readings: 2, doubts: 0, clear: 2, silent: 0 })
  expect(s.caught).toEqual([2, 2])
  expect(s.blanks).toEqual([0, 2])
})

test('a clear reading with another value is a silent error, and is named', () => {
  const s = score({ ...all, jar_start_ml: clear(4300), area_unit: clear('acre') })
  expect(s.tied.silent).toBe(1)
  expect(s.ticks.silent).toBe(1)
  expect(s.mistakes.map((m) => m.key)).toEqual(['jar_start_ml', 'area_unit'])
})

test('what was made wrong on purpose and came out clear is missed; with another value it is silent too', () => {
  const s = score({ ...all, fuel_used_written_ml: clear(3800), gear: clear(3) })
  expect(s.caught).toEqual([0, 2])
  expect(s.missed).toEqual(['gear', 'fuel_used_written_ml'])
  expect(s.tied.silent + s.untied.silent).toBe(0)
  expect(score({ ...all, gear: clear(8) }).untied.silent).toBe(1)
})

test('a blank read as something is counted by itself, and a reading that is missing is in doubt', () => {
  expect(score({ ...all, diag_bd_m: clear(70.1) }).blanks).toEqual([1, 2])
  const { pass_count: _, ...rest } = all
  expect(score(rest).untied.doubts).toBe(1)
})

test('a photo to take again, and one that gave no page, count in that share alone', () => {
  const again = { ...pageOf({}), takeAgain: { code: 'glare', advice: 'Turn the sheet.' } }
  const pages = [again, undefined, pageOf(all)].map((page) => scorePage('f', page, truth, layout, tied, null, 100))
  const figures = levelFigures(pages)
  expect(figures.takeAgainShare).toBeCloseTo(2 / 3, 12)
  expect(figures.takeAgainCodes).toEqual({ glare: 1, 'no page': 1 })
  expect(figures.numbers.tied.readings).toBe(2)
  expect(figures.catchShare).toBe(1)
})

import { expect, test } from 'vitest'
import { sharesOf } from '../../shared/trial/budget.ts'
import { computeResults } from '../../shared/trial/compute-results.ts'
import { burnLines, burnTables, leastArea_ha } from '../../web/features/demonstrations/plan-model.ts'
import { largestWords } from '../../web/features/record/budget-words.ts'
import { mainFigureOf } from '../../web/features/record/record-model.ts'
import { buildFacts, buildFullReadings } from '../builders/readings.ts'
import { buildImplement, buildKit } from '../builders/register.ts'

const id = '00000000-0000-4000-8000-000000000001'
const golden = computeResults(buildFullReadings(), buildFacts())

// The golden sheet: u(jar) 81.65 of u(F) 88.29 mL, and 0.613 % of area: (81.65/3800 ÷ 0.02402892)² = 80 %.
test('the budget of litres a hectare is told in words: the jar, and what would make it smaller', () => {
  expect(largestWords(sharesOf(golden.l_per_ha.budget))).toBe(
    '80 % of the variance is the jar. A jar with finer marks, or refilling it to the same line, makes it smaller.',
  )
})

test('of an area it is the edge of the plot; of nothing unsure there is nothing to say', () => {
  expect(largestWords(sharesOf(golden.area_m2.budget))).toMatch(/^9\d % of the variance is the edge of the plot\./)
  expect(largestWords([])).toBeNull()
})

test('where no part is much, the two largest are named', () => {
  const lines = sharesOf([
    { name: 'clock', u: 1 },
    { name: 'tape', u: 0.98 },
    { name: 'filling the jug', u: 0.96 },
  ])
  expect(largestWords(lines)).toBe('The largest part is the clock, 35 % of the variance, with the tape more than half.')
})

test('a sheet without a plot has litres an hour as its main figure', () => {
  const hauled = computeResults({ jar_start_ml: 4800, jar_end_ml: 2000, t_start: '09:10', t_end: '10:02' })
  expect(mainFigureOf({ results: hauled as never })?.key).toBe('l_per_h')
  expect(mainFigureOf({ results: golden as never })?.key).toBe('l_per_ha')
})

// The method's table of least fuel: one top-up, ± 5 %; litres an hour has no area in it: √(7500 ÷ 5.9167e-4) = 3560.
test('the day page tells how much to burn in marks of the jar', () => {
  const kit = { ...buildKit({ jarMark_ml: 200, jugMark_ml: 100 }), id, version: 1 }
  expect(burnLines(kit).find((line) => line.says === 'L/h to ± 5 %')).toEqual({ says: 'L/h to ± 5 %', least_ml: 3570, marks: 18 })
  const hectare = burnLines(kit).find((line) => line.says === 'L/ha to ± 5 %')
  expect(hectare?.least_ml).toBeGreaterThan(3570)
  expect(burnLines({ ...kit, scale_pct: 4 }).find((line) => line.says === 'L/h to ± 3 %')?.least_ml).toBeNull()
})

test('like kits share one table, and a kit that only hauls is told nothing of hectares', () => {
  const kit = (number: number, jarMark_ml = 200) => ({ ...buildKit({ number, jarMark_ml, jugMark_ml: 100 }), id, version: 1 })
  const used = [1, 2, 3].map((number) => ({ kit: kit(number), perArea: number !== 3 }))
  const tables = burnTables([...used, { kit: kit(4, 100), perArea: true }])
  expect(tables.map(({ kits }) => kits)).toEqual([[1, 2], [3], [4]])
  expect(tables[1]?.lines.map(({ says }) => says)).toEqual(['L/h to ± 3 %', 'L/h to ± 5 %', 'L/h to ± 10 %'])
})

test('the plan tells the least plot for a kit and an implement, where a usual figure is known', () => {
  const kit = { ...buildKit({ jarMark_ml: 200, jugMark_ml: 100 }), id, version: 1 }
  const plough = { ...buildImplement({ operation: 'plough', ratedWidth_m: 0.9 }), id, version: 1 }
  // √((3560 ÷ 1.5715)² + (0.9 × 60)²/12 ÷ 5.9167e-4) m².
  expect(leastArea_ha(kit, plough)).toBeCloseTo(0.2354, 3)
})

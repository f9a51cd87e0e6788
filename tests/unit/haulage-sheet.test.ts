import { expect, test } from 'vitest'
import { judgeSheet } from '../../shared/checks/judge-sheet.ts'
import { haulage1 } from '../../shared/layouts/haulage-1.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import { buildPtoRun, buildRoadRun } from '../builders/haulage.ts'
import { buildFacts } from '../builders/readings.ts'

/** A trailer has no working width, and an operation no draft is known for. */
const facts = buildFacts({ ratedWidth_m: null, operation: null, maxDepth_cm: null })
const judge = (readings: Readings) => judgeSheet(haulage1, readings, facts)

test.each([
  ['road', buildRoadRun()],
  ['PTO', buildPtoRun()],
])('a whole %s run fires no rule', (_, readings) => {
  expect(judge(readings).findings).toEqual([])
})

test('fuel and time give their figures; whatever needs a plot, a depth or a pull says that the sheet does not measure it', () => {
  const { results } = judge(buildRoadRun())
  expect(results.fuel_ml.value).toBe(4400)
  // 4.4 L in 64 min less two stops of 6 min with the engine off.
  expect(results.l_per_h.value).toBeCloseTo((4.4 * 60) / 52, 9)
  expect(results.speed_km_h.value).toBeCloseTo((3.6 * 300) / 54.7, 9)
  for (const key of ['l_per_ha', 'ml_per_m3', 'area_m2', 'depth_mean_cm', 'width_mean_m', 'slip_pct', 'efc_ha_h'] as const)
    expect([key, results[key].value, results[key].reason?.code]).toEqual([key, null, 'not_on_sheet'])
})

test('a check that is not ticked, a way without its load and a wrong sum are told as on any sheet', () => {
  const told = (changes: Readings) => judge(buildRoadRun(changes)).findings.map((f) => [f.rule, f.severity])
  expect(told({ vent_open: false })).toContainEqual(['Q34', 'stop'])
  expect(told({ hitch_locked: false })).toEqual([['L03', 'doubt']])
  expect(told({ load_kg: null })).toEqual([['L10', 'doubt']])
  expect(told({ distance_loaded_km: 25 })).toEqual([['L11', 'stop']])
  expect(told({ l_per_h_written: 4.13 })).toEqual([['Q17', 'doubt']])
  expect(told({ fuel_used_written_ml: 4000 })).toContainEqual(['Q08', 'doubt'])
  expect(told({ work_kind: null })).toContainEqual(['Q56', 'doubt'])
})

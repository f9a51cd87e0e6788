import { expect, test } from 'vitest'
import { judgeSheet } from '../../shared/checks/judge-sheet.ts'
import { haulage1 } from '../../shared/layouts/haulage-1.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import { stripOf } from '../../web/features/desk/model/strip.ts'
import { buildRoadRun } from '../builders/haulage.ts'
import { buildFacts, buildReadings } from '../builders/readings.ts'

const shown = (results: Parameters<typeof stripOf>[0]) => stripOf(results, []).map(({ key }) => key)

test('the foot of the desk shows the figures that the sheet in hand measures, six at most', () => {
  expect(shown(judgeSheet(tillage1, buildReadings(), buildFacts()).results)).toEqual([
    'fuel_ml',
    'l_per_ha',
    'l_per_acre',
    'l_per_h',
    'depth_mean_cm',
    'efc_ha_h',
  ])
  expect(shown(judgeSheet(haulage1, buildRoadRun(), buildFacts({ operation: 'transport' })).results)).toEqual([
    'fuel_ml',
    'l_per_h',
    'l_per_100_km',
    'l_per_t',
    'l_per_t_km',
    'speed_km_h',
  ])
})

test('a figure left blank stays at the foot with its reason', () => {
  const [fuel] = stripOf(judgeSheet(haulage1, buildRoadRun({ jar_end_ml: null }), buildFacts()).results, [])
  expect(fuel).toMatchObject({ key: 'fuel_ml', value: null, reason: expect.stringContaining('jar level at the end') })
})

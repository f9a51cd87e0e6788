import { expect, test } from 'vitest'
import { planLines } from '../../print/plan-lines.ts'
import { planFindings } from './plan-findings.ts'

const plan = {
  runId: 'r',
  runNumber: 2,
  runs: 3,
  heldOn: '2026-10-20',
  plot: 'upper',
  demonstratorId: 'd',
  demonstratorNumber: 102,
  placeNumber: 6,
  tractorNumber: 12,
  implementNumber: 24,
  kitNumber: 32,
}
const printed = planLines({
  heldOn: '2026-10-20',
  run: 2,
  runs: 3,
  place: { number: 6, name: 'Tamrol' },
  farmer: 'S. Oduvar',
  plot: 'upper',
  tractor: {
    number: 12,
    name: 'Tarnfold 60',
    ratedPower_kw: 45,
    ratedRpm: 2200,
    drive: '4WD',
    tyreFront: '8.00-18',
    tyreRear: '14.9-28',
  },
  implement: { number: 24, name: 'disc harrow', ratedWidth_m: 2 },
  kit: { number: 32, jarCapacity_ml: 5000, jugCapacity_ml: 1000, tapeSerial: 'T-32', gaugeSerial: 'P-32' },
  demonstrator: { number: 102, name: 'Ilan Quasny' },
  driver: 'Nils Fenwor',
}).map((l) => `${l.label} ${l.value}`)

test('a block that says what the plan says raises nothing', () => {
  expect(planFindings(printed, plan)).toEqual([])
})

test('a block printed before the tractor was exchanged names tractor and both numbers', () => {
  const found = planFindings(printed, { ...plan, tractorNumber: 15, heldOn: '2026-10-21' })
  expect(found.map((f) => f.cells)).toEqual([['trial_date'], ['tractor_id']])
  expect(found[1]?.text).toContain('tractor 12, the plan says 15')
})

test('what could not be recognised says nothing', () => {
  expect(planFindings(['tract?r l2', ''], plan)).toEqual([])
  expect(planFindings(['date 47-11-2026'], plan)).toEqual([])
  expect(planFindings(['date 20-10-2626'], plan)).toEqual([])
})

test('every number that the block prints is compared', () => {
  const other = {
    placeNumber: 7,
    tractorNumber: 13,
    implementNumber: 25,
    kitNumber: 33,
    demonstratorNumber: 103,
    heldOn: '2026-10-21',
  }
  const found = planFindings(printed, { ...plan, ...other })
  expect(found.map((f) => f.compared.printed)).toEqual(['20-10-2026', '6', '12', '24', '32', '102'])
})

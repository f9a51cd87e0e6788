/** The demo season's runs on halved plots, from their rows to what a comparison sees of them. */
import { readFileSync } from 'node:fs'
import type { ComparableRun } from '../../server/db/desk/comparable-runs.ts'
import { IMPLEMENTS, PLACES, TRACTORS } from '../../server/demo/registers.ts'
import { HALVED_RUNS } from '../../server/demo/season.ts'
import { judgeSheet } from '../../shared/checks/judge-sheet.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import { readCsv } from '../../worker/readers/spreadsheet/csv.ts'
import { factsOf } from '../simulator/sample-season-csv.ts'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
function byNumber<T extends { number: number }>(rows: readonly T[], number: number): T & { id: string } {
  const row = rows.find((r) => r.number === number)
  if (!row) throw new Error(`no row ${number} in the register`)
  return { ...row, id: uuid(number) }
}

export interface HalvedRun {
  tractor: number
  plot: string
  readings: Readings
  run: ComparableRun
}

/** What stands in samples/season/halves.csv of two tractors. */
export function readHalvedRuns(tractors: readonly number[]): HalvedRun[] {
  const reading = readCsv(readFileSync('samples/season/halves.csv'))
  if (reading.kind !== 'blocks') throw new Error(reading.reason)
  return reading.blocks.flatMap((block) => {
    const planned = HALVED_RUNS.find((run) => run.sheetCode === block.sheetCode)
    if (!planned || !tractors.includes(planned.tractor)) return []
    const readings = Object.fromEntries(Object.entries(block.values).map(([key, { value }]) => [key, value]))
    const { results } = judgeSheet(tillage1, readings, factsOf(planned))
    const { name, district } = byNumber(PLACES, planned.place)
    const implement = byNumber(IMPLEMENTS, planned.implement)
    const run: ComparableRun = {
      number: block.number,
      state: 'entered',
      trialDate: planned.heldOn,
      gear: 'L3',
      soil: String(readings.soil_class),
      tractor: byNumber(TRACTORS, planned.tractor),
      implement: { ...implement, operation: implement.operation },
      place: { name, district },
      plot: planned.plot,
      results: Object.fromEntries(Object.entries(results).map(([key, { value, U, reason }]) => [key, { value, U, reason }])),
      exclusion: null,
    }
    return [{ tractor: planned.tractor, plot: `${planned.heldOn} ${planned.plot}`, readings, run }]
  })
}

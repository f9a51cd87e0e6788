/**
 * Writes samples/season/rows.csv: the demo season's runs that came in as spreadsheet rows, in the CSV form of the layout. The
 * figures are the scenario's; a draw on which a rule has a doubt is drawn again, since these stand for sheets long entered.
 */
import { mkdir, writeFile } from 'node:fs/promises'
import { IMPLEMENTS, KITS, TRACTORS } from '../../server/demo/registers.ts'
import { type DemoRun, hourMeterAt, ROW_RUNS, TROUBLE_RUNS } from '../../server/demo/season.ts'
import { csvLine } from '../../server/print/csv-text.ts'
import { judgeSheet } from '../../shared/checks/judge-sheet.ts'
import { csvHeading, FORM_HEAD, formRows } from '../../shared/layouts/form.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Facts } from '../../shared/trial/facts.ts'
import { chanceOf } from './random.ts'
import type { Written } from './scenario.ts'
import { MACHINES, tillageScenario } from './scenario-tillage.ts'

const TRIES = 5000
/** When a tractor was last done on a day: its next run starts later. */
const ends = new Map<string, string>()

function factsOf(run: DemoRun): Facts {
  const tractor = TRACTORS.find((t) => t.number === run.tractor)!
  const tool = IMPLEMENTS.find((i) => i.number === run.implement)!
  const kit = KITS.find((k) => k.number === run.kit)!
  return {
    ...tractor,
    ratedWidth_m: tool.ratedWidth_m,
    operation: tool.operation,
    maxDepth_cm: tool.maxDepth_cm,
    ...kit,
    ruleReach_cm: kit.ruleLength_cm,
    kitCheckedOn: kit.checkedOn,
    today: run.heldOn,
    arrivedOn: run.heldOn,
  }
}

function rowOf(run: DemoRun): Record<string, Written> {
  const machine = MACHINES.find((m) => m.implement_id === run.implement)!
  const head = {
    trial_date: run.heldOn,
    place_id: run.place,
    demonstrator_id: run.demonstrator,
    tractor_id: run.tractor,
    implement_id: run.implement,
    kit_id: run.kit,
  }
  for (let attempt = 0; attempt < TRIES; attempt += 1) {
    const { readings } = tillageScenario(chanceOf(`season|${run.sheetCode}|${attempt}`), { head, machine })
    if (String(readings.t_start) <= (ends.get(`${run.heldOn}|${run.tractor}`) ?? '')) continue
    if (run.run === 1 && String(readings.t_start) > '08:30') continue
    if (run.run === 2 && String(readings.t_start) > '11:30') continue
    const span = Number(readings.hour_meter_end) - Number(readings.hour_meter_start)
    const start = hourMeterAt(run.tractor, run.heldOn, run.run)
    Object.assign(readings, {
      hour_meter_start: start,
      hour_meter_end: Math.round((start + span) * 10) / 10,
      gear_range: 'L',
      gear: 3,
      soil_class: run.place > 3 ? 'fine' : 'medium',
    })
    if (judgeSheet(tillage1, readings, factsOf(run)).findings.some((f) => f.severity !== 'note')) continue
    ends.set(`${run.heldOn}|${run.tractor}`, String(readings.t_end))
    return readings
  }
  throw new Error(`no draw of ${run.sheetCode} passes the rules after ${TRIES} tries`)
}

/** One thing wrong with each, as it comes from the field. */
const TROUBLES: ReadonlyArray<(r: Record<string, Written>) => Record<string, Written>> = [
  (r) => ({ area_written: Math.round(Number(r.area_written) * (r.area_unit === 'acre' ? 0.404686 : 2.471054) * 1000) / 1000 }),
  () => ({ vent_open: false }),
  (r) => ({ fuel_used_written_ml: Number(r.fuel_used_written_ml) + 400 }),
  (r) => ({
    tyre_p_rl: Math.round(Number(r.tyre_p_rl) * 0.7 * 100) / 100,
    depth_mean_written_cm: Number(r.depth_mean_written_cm) + 1,
  }),
  () => ({ tyre_p_unit: null, soil_class: null }),
  (r) => ({ jar_start_ml: Number(r.jar_end_ml), jar_end_ml: Number(r.jar_start_ml) }),
]

const rows = formRows(tillage1)
const written = (value: Written | undefined) =>
  value === undefined || value === null ? '' : value === true ? 'yes' : value === false ? 'no' : value
const heading = csvLine([
  FORM_HEAD.layout,
  FORM_HEAD.version,
  FORM_HEAD.decimalMark,
  FORM_HEAD.sheetCode,
  ...rows.map(csvHeading),
])
const lineOf = (run: DemoRun, values: Record<string, Written>) =>
  csvLine([tillage1.key, tillage1.version, '.', run.sheetCode, ...rows.map((r) => written(values[r.key]))])

await mkdir('samples/season', { recursive: true })
await writeFile('samples/season/rows.csv', heading + ROW_RUNS.map((run) => lineOf(run, rowOf(run))).join(''))
const troubled = TROUBLE_RUNS.map((run, i) => {
  const values = rowOf(run)
  return lineOf(run, { ...values, ...TROUBLES[i % TROUBLES.length]!(values) })
})
await writeFile('samples/season/trouble.csv', heading + troubled.join(''))
process.stdout.write(`samples/season: ${ROW_RUNS.length} runs, ${troubled.length} with trouble\n`)

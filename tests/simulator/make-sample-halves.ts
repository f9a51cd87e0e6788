/**
 * Writes samples/season/halves.csv: two tractors side by side, each plot halved between them. One kit goes from half to half, so a
 * day's runs follow each other and the tractors take turns at being first. What a plot asks of both (its soil, how deep it was
 * worked) is in both its runs; a draw of the scenario that is not such a run, or that a rule doubts, is drawn again.
 */
import { mkdir, writeFile } from 'node:fs/promises'
import { type DemoRun, HALVED_RUNS, hourMeterAt } from '../../server/demo/season.ts'
import { judgeSheet } from '../../shared/checks/judge-sheet.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import { chanceOf } from './random.ts'
import { factsOf, SEASON_HEADING, seasonLine } from './sample-season-csv.ts'
import { clock, toPlaces, type Written } from './scenario.ts'
import { MACHINES, tillageScenario } from './scenario-tillage.ts'

type Readings = Record<string, Written>

/** What a plot was worked with: its depth, and what each tractor burned, the one of the lower number first. */
type Plot = readonly [depth_cm: number, first_l_ha: number, second_l_ha: number]

/** By day, plot by plot. Tractors 11 and 14 differ by more than a run is sure of; 12 and 15 do not. */
const PLOTS: Record<string, readonly Plot[]> = {
  '2026-09-16': [
    [15.5, 16.1, 18.4],
    [14.5, 15.2, 16.3],
    [16.5, 17, 18.9],
  ],
  '2026-11-04': [
    [15, 14.9, 15.7],
    [17, 16.6, 19.2],
    [15.5, 15.8, 17.3],
  ],
  '2026-09-23': [
    [16, 17.2, 16.3],
    [15, 15.9, 16.6],
    [17, 16.8, 15.7],
  ],
  '2026-10-07': [
    [17, 18.1, 18.5],
    [15.5, 17.4, 16.8],
    [16.5, 18.6, 18.3],
  ],
}
const HALF_M2 = [2100, 3000] as const
/** How far a half's rate may be from what its plot asks; levels read to a mark allow no nearer. */
const OFF_L_HA = 0.15
const FIRST_START_MIN = 7 * 60 + 20
/** From the end of one run to the start of the next: the kit changes tractors. */
const BETWEEN_MIN = 18
/** On a tractor's meter from one half to its next. */
const MOVING_H = 0.1
const TRIES = 400_000

const at = (readings: Readings, key: string) => Number(readings[key] ?? Number.NaN)
const minutes = (time: Written) => Number(String(time).slice(0, 2)) * 60 + Number(String(time).slice(3))
const isNear = (value: number, other: number, share: number) => Math.abs(value / other - 1) <= share

/** The same run, begun at another time of day. */
function begunAt(readings: Readings, start_min: number): Readings {
  const by = start_min - minutes(readings.t_start ?? null)
  const moved = Object.entries(readings).map(([key, value]) => {
    const isTime = typeof value === 'string' && /^\d\d:\d\d$/.test(value)
    return [key, isTime ? clock(minutes(value) + by) : value]
  })
  return Object.fromEntries(moved)
}

/** A rectangle of a half's size, and where the other half was worked already, of its sides. */
function fitsPlot(readings: Readings, l_ha: number, other: Readings | undefined): boolean {
  const [ab, bc] = [at(readings, 'side_ab_m'), at(readings, 'side_bc_m')]
  if (readings.side_cd_m !== null || ab * bc < HALF_M2[0] || ab * bc > HALF_M2[1]) return false
  if (Math.abs((at(readings, 'fuel_used_written_ml') / (ab * bc)) * 10 - l_ha) > OFF_L_HA) return false
  return other === undefined || (isNear(ab, at(other, 'side_ab_m'), 0.02) && isNear(bc, at(other, 'side_bc_m'), 0.04))
}

/** A day so far. */
interface Day {
  start_min: number
  /** Hours on each tractor's meter as its next run begins. */
  meterAfter: Map<number, number>
}

function halfOf(run: DemoRun, depth_cm: number, l_ha: number, { start_min, meterAfter }: Day, other?: Readings): Readings {
  const machine = {
    ...MACHINES.find((m) => m.implement_id === run.implement)!,
    depth_cm: [depth_cm, depth_cm] as const,
    fuel_l_ha: [l_ha, l_ha] as const,
  }
  const head = {
    trial_date: run.heldOn,
    place_id: run.place,
    demonstrator_id: run.demonstrator,
    tractor_id: run.tractor,
    implement_id: run.implement,
    kit_id: run.kit,
  }
  for (let attempt = 0; attempt < TRIES; attempt += 1) {
    const drawn = tillageScenario(chanceOf(`season|${run.sheetCode}|${attempt}`), { head, machine, worthwhile: true }).readings
    if (!fitsPlot(drawn, l_ha, other)) continue
    const start_h = meterAfter.get(run.tractor) ?? hourMeterAt(run.tractor, run.heldOn, run.run)
    const span_h = at(drawn, 'hour_meter_end') - at(drawn, 'hour_meter_start')
    const readings = {
      ...begunAt(drawn, start_min),
      hour_meter_start: start_h,
      hour_meter_end: toPlaces(start_h + span_h, 1),
      gear_range: 'L',
      gear: 3,
      soil_class: run.place > 3 ? 'fine' : 'medium',
    }
    if (judgeSheet(tillage1, readings, factsOf(run)).findings.every((f) => f.severity === 'note')) return readings
  }
  throw new Error(`no draw of ${run.sheetCode} passes the rules after ${TRIES} tries`)
}

/** A day's runs in the order they were worked: plot by plot, the tractors in turn first. */
function dayOf(runs: readonly DemoRun[], plots: readonly Plot[]): string {
  const lower = Math.min(...runs.map((run) => run.tractor))
  const day: Day = { start_min: FIRST_START_MIN, meterAfter: new Map() }
  return plots
    .flatMap(([depth_cm, first_l_ha, second_l_ha], p) => {
      const halves = runs.filter((run) => run.run === p + 1)
      let other: Readings | undefined
      return (p % 2 === 0 ? halves : halves.toReversed()).map((run) => {
        other = halfOf(run, depth_cm, run.tractor === lower ? first_l_ha : second_l_ha, day, other)
        day.start_min = minutes(other.t_end ?? null) + BETWEEN_MIN
        day.meterAfter.set(run.tractor, toPlaces(at(other, 'hour_meter_end') + MOVING_H, 1))
        return seasonLine(run, other)
      })
    })
    .join('')
}

const days = Object.entries(PLOTS).map(([heldOn, plots]) =>
  dayOf(
    HALVED_RUNS.filter((run) => run.heldOn === heldOn),
    plots,
  ),
)
await mkdir('samples/season', { recursive: true })
await writeFile('samples/season/halves.csv', SEASON_HEADING + days.join(''))
process.stdout.write(`samples/season: ${HALVED_RUNS.length} runs on halved plots\n`)

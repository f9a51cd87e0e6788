/** What the demo season planned: the runs whose sheets came in as spreadsheet rows. Runs with a photographed sheet are in samples/. */
import { createHash } from 'node:crypto'
import { makeSheetCode } from '../../shared/layouts/sheet-code.ts'

/** Numbers of the registers. */
export interface DemoRun {
  heldOn: string
  place: number
  demonstrator: number
  tractor: number
  implement: number
  kit: number
  plot: string
  /** Which of the tractor's runs that day, from 1. */
  run: number
  sheetCode: string
}

export const RUNS_A_TRACTOR = 3

/** Two tractors with the same implement on one day: what a comparison later needs. */
type Day = readonly [
  heldOn: string,
  place: number,
  demonstrator: number,
  tractors: readonly [number, number],
  implement: number,
  kit: number,
]

/** Each tractor kept its own plot all day. */
const DAYS: readonly Day[] = [
  ['2026-09-30', 4, 103, [11, 14], 23, 33],
  ['2026-10-14', 3, 101, [13, 16], 22, 31],
  ['2026-10-22', 6, 103, [13, 16], 25, 33],
  ['2026-11-12', 5, 104, [13, 16], 26, 32],
]

/** Each plot was halved between the two. */
const HALVED_DAYS: readonly Day[] = [
  ['2026-09-16', 1, 101, [11, 14], 21, 31],
  ['2026-09-23', 2, 102, [12, 15], 22, 32],
  ['2026-10-07', 5, 104, [12, 15], 22, 31],
  ['2026-11-04', 2, 102, [11, 14], 21, 32],
]

/** The same code on every machine, with its check character. */
function codeOf(seed: string): string {
  let taken = 0
  return makeSheetCode((below) => createHash('sha256').update(`demo season|${seed}|${taken++}`).digest().readUInt32BE() % below)
}

const ownPlot = (tractor: number): string => ['A, by the road', 'B, by the ditch'][tractor]!
const halfOfPlot = (_tractor: number, run: number): string => ['upper', 'middle', 'lower'][run]!

/** @param plotOf names the plot of the day's nth tractor and its nth run, both from 0 */
const runsOf = (days: readonly Day[], plotOf: (tractor: number, run: number) => string): DemoRun[] =>
  days.flatMap(([heldOn, place, demonstrator, tractors, implement, kit]) =>
    tractors.flatMap((tractor, t) =>
      Array.from({ length: RUNS_A_TRACTOR }, (_, i) => ({
        heldOn,
        place,
        demonstrator,
        tractor,
        implement,
        kit,
        plot: plotOf(t, i),
        run: i + 1,
        sheetCode: codeOf(`${heldOn}|${tractor}|${i + 1}`),
      })),
    ),
  )

/** Runs whose rows came in clean and were entered. */
export const ROW_RUNS: readonly DemoRun[] = runsOf(DAYS, ownPlot)
/** The same, each plot worked by both tractors: what carries a paired comparison. */
export const HALVED_RUNS: readonly DemoRun[] = runsOf(HALVED_DAYS, halfOfPlot)
/** Runs whose rows have something wrong with them: they wait at the desk. */
export const TROUBLE_RUNS: readonly DemoRun[] = runsOf([['2026-11-19', 4, 103, [12, 15], 23, 33]], ownPlot)

const DAY_MS = 86_400_000
const SEASON_BEGINS = Date.UTC(2026, 8, 1)

/** Hours on a tractor's meter when a run began: it only ever goes up over the season. */
export function hourMeterAt(tractor: number, heldOn: string, run: number): number {
  const days = (Date.parse(`${heldOn}T00:00:00Z`) - SEASON_BEGINS) / DAY_MS
  return Math.round((1138.3 + 137 * (tractor - 11) + 6 * days + 2.6 * (run - 1)) * 10) / 10
}

/** Planned and not yet held: a day next week and one the week after, seen from the day the season is loaded. */
export const runsToCome = (today: Date): readonly DemoRun[] => {
  const inDays = (days: number) => new Date(today.getTime() + days * DAY_MS).toISOString().slice(0, 10)
  const days: readonly Day[] = [
    [inDays(6), 3, 101, [11, 14], 23, 31],
    [inDays(13), 5, 104, [12, 15], 21, 33],
  ]
  return runsOf(days, ownPlot)
}

/** The runs behind the samples: which demonstration, which machines, which sheet. The demonstration season is built from it. */
import { IMPLEMENTS, KITS, PEOPLE, PLACES, TRACTORS } from '../../server/demo/registers.ts'
import { planLines } from '../../server/print/plan-lines.ts'
import type { PlanLine } from '../../server/print/sheet-pdf.ts'
import { makeSheetCode } from '../../shared/layouts/sheet-code.ts'
import { chanceOf } from './random.ts'
import type { Written } from './scenario.ts'

export interface SampleRun {
  /** Folder under samples/. */
  case: string
  /** Page in a file of several pages, from 1. */
  page?: number
  sheetCode: string
  /** The typed block is printed, and the head has no boxes. */
  planned: boolean
  trial_date: string
  ids: { demonstrator_id: number; place_id: number; tractor_id: number; implement_id: number; kit_id: number }
  plot: string
  run: number
  runs: number
  farmer: string
  driver: string
}

interface Day {
  trial_date: string
  place: number
  demonstrator: number
  implement: number
  kit: number
  farmer: string
  driver: string
  trials: ReadonlyArray<{ tractor: number; plot: string; runs: ReadonlyArray<string | readonly [string, number]> }>
}

/** A name with a star is a sheet without a plan: its head was filled in by hand. */
const DAYS: readonly Day[] = [
  {
    trial_date: '2026-09-18',
    place: 3,
    demonstrator: 101,
    implement: 21,
    kit: 31,
    farmer: 'Harun Dello',
    driver: 'Timo Brask',
    trials: [
      { tractor: 11, plot: 'A, by the road', runs: ['golden', 'careful', 'flat-scan*'] },
      { tractor: 14, plot: 'B, by the ditch', runs: ['shadow', 'tilted*', 'coffee'] },
    ],
  },
  {
    trial_date: '2026-10-20',
    place: 6,
    demonstrator: 102,
    implement: 24,
    kit: 32,
    farmer: 'Selma Oduvar',
    driver: 'Nils Fenwor',
    trials: [
      { tractor: 12, plot: 'upper', runs: ['pencil', 'crossed-out*', 'wrong-sum'] },
      { tractor: 15, plot: 'lower', runs: ['photocopy*', 'curled', 'turned*'] },
    ],
  },
  {
    trial_date: '2026-11-17',
    place: 1,
    demonstrator: 104,
    implement: 26,
    kit: 33,
    farmer: 'Ivo Karsten',
    driver: 'Mats Ruhl',
    trials: [
      {
        tractor: 13,
        plot: 'east half',
        runs: [
          ['three-pages', 1],
          ['three-pages', 2],
          ['three-pages', 3],
        ],
      },
      { tractor: 16, plot: 'west half', runs: ['blanks', 'small*', 'corner-missing'] },
    ],
  },
  {
    trial_date: '2026-11-24',
    place: 5,
    demonstrator: 103,
    implement: 25,
    kit: 31,
    farmer: 'Runa Pellow',
    driver: 'Odd Vestra',
    trials: [{ tractor: 15, plot: 'by the well', runs: ['blurred*', 'four-sides', 'thumb*'] }],
  },
]

/** Every run, in the order of the season. */
export const SAMPLE_RUNS: readonly SampleRun[] = DAYS.flatMap((day) =>
  day.trials.flatMap(({ tractor, plot, runs }) =>
    runs.map((entry, i): SampleRun => {
      const [name, page] = typeof entry === 'string' ? [entry, undefined] : entry
      const chance = chanceOf(`sample sheet ${name} ${page ?? ''}`)
      return {
        case: name.replace('*', ''),
        ...(page ? { page } : {}),
        sheetCode: makeSheetCode((below) => chance.whole(0, below - 1)),
        planned: !name.endsWith('*'),
        trial_date: day.trial_date,
        ids: {
          demonstrator_id: day.demonstrator,
          place_id: day.place,
          tractor_id: tractor,
          implement_id: day.implement,
          kit_id: day.kit,
        },
        plot,
        run: i + 1,
        runs: runs.length,
        farmer: day.farmer,
        driver: day.driver,
      }
    }),
  ),
)

/** The readings of the head: by hand on a sheet without plan, from the plan otherwise. */
export const headOf = (run: SampleRun): Record<string, Written> => ({ trial_date: run.trial_date, ...run.ids })

function byNumber<T extends { number: number }>(rows: readonly T[], number: number): T {
  const row = rows.find((r) => r.number === number)
  if (!row) throw new RangeError(`no row ${number} in the register`)
  return row
}

/** The typed block of a run, as the season's registers print it. */
export const planLinesOf = (run: SampleRun): PlanLine[] =>
  planLines({
    heldOn: run.trial_date,
    run: run.run,
    runs: run.runs,
    place: byNumber(PLACES, run.ids.place_id),
    farmer: run.farmer,
    plot: run.plot,
    tractor: byNumber(TRACTORS, run.ids.tractor_id),
    implement: byNumber(IMPLEMENTS, run.ids.implement_id),
    kit: byNumber(KITS, run.ids.kit_id),
    demonstrator: byNumber(PEOPLE, run.ids.demonstrator_id),
    driver: run.driver,
  })

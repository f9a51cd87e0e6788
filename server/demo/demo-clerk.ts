/** What the demo season's clerk did: settled the doubts of the better photos by the paper, and entered what was settled. */
import { readFile } from 'node:fs/promises'
import type { Sheet, Value } from '../../shared/schemas/sheet.ts'
import type { User } from '../../shared/schemas/user.ts'
import { listSheetRows } from '../db/desk/sheet-rows.ts'
import { getSheet } from '../features/sheets/change-sheet.ts'
import { sendBack } from '../features/sheets/desk.service.ts'
import { enterSheet } from '../features/sheets/enter.service.ts'
import { settleOneDoubt, settleOneReading } from '../features/sheets/settle.service.ts'
import type { Deps } from '../http/route.ts'
import { type SampleSheet, truthFile } from './sample-sheets.ts'

/** Sheets with trouble of their own stay at the desk, so that its pages have something true to show. */
const LEFT_AT_THE_DESK = new Set(['wrong-sum', 'crossed-out', 'blanks', 'pencil', 'small', 'thumb', 'corner-missing'])

interface Truth {
  sheet: string
  readings: Record<string, Value>
}

/** A clerk with the paper in hand: keeps what was read right, corrects what was not. */
export async function settleByPaper(deps: Deps, clerk: User, samples: readonly SampleSheet[]): Promise<void> {
  for (const sample of samples.filter((s) => !LEFT_AT_THE_DESK.has(s.case))) {
    const paper = await paperOf(sample)
    const { rows } = await listSheetRows(deps.source.manager, { desk: true, search: sample.sheetCode })
    for (const row of rows) {
      const settled = await settleReadings(deps, clerk, await getSheet(deps, clerk, row.id), paper)
      await letDoubtsStand(deps, clerk, settled)
    }
  }
}

async function paperOf(sample: SampleSheet): Promise<Record<string, Value>> {
  const truth = JSON.parse(await readFile(truthFile(sample), 'utf8')) as Truth | Truth[]
  return [truth].flat().find((t) => t.sheet === sample.sheetCode)?.readings ?? {}
}

async function settleReadings(deps: Deps, clerk: User, sheet: Sheet, paper: Record<string, Value>): Promise<Sheet> {
  let at = sheet
  for (const { key, value } of sheet.readings.filter((r) => r.state === 'in doubt' && r.settlement === null)) {
    const written = paper[key] ?? null
    const settle =
      written === value
        ? ({ how: 'kept', why: '' } as const)
        : written === null
          ? ({ how: 'blank on purpose', why: '' } as const)
          : ({ how: 'corrected', value: written, why: 'as the paper shows' } as const)
    at = await settleOneReading(deps, clerk, sheet.id, { version: at.version, key, ...settle })
  }
  return at
}

/** What the rules doubt and the paper says all the same; a stop is left for a person to look at. */
async function letDoubtsStand(deps: Deps, clerk: User, sheet: Sheet): Promise<void> {
  let at = sheet
  for (const doubt of sheet.doubts.filter((d) => d.severity === 'doubt' && d.settledAt === null)) {
    at = await settleOneDoubt(deps, clerk, sheet.id, {
      version: at.version,
      doubtId: doubt.id,
      why: 'asked the demonstrator: it was so',
    })
  }
}

/** The sheet with too many blanks goes back to its demonstrator, with the reason by mail. */
export async function sendBackBlanks(deps: Deps, clerk: User, samples: readonly SampleSheet[]): Promise<void> {
  const blanks = samples.find((s) => s.case === 'blanks')
  if (!blanks) return
  const { rows } = await listSheetRows(deps.source.manager, { desk: true, search: blanks.sheetCode })
  for (const row of rows) {
    const sheet = await getSheet(deps, clerk, row.id)
    const reason = 'Tyre pressures have no unit, and several cells are blank. What was measured, and what was not?'
    await sendBack(deps, clerk, row.id, { version: sheet.version, reason, cells: [] })
  }
}

/** Enters every sheet on which nothing is open; returns how many. */
export async function enterSettled(deps: Deps, clerk: User): Promise<number> {
  const { rows } = await listSheetRows(deps.source.manager, { state: 'settled' })
  const oldestFirst = [...rows].sort((a, b) => (a.trialDate ?? '').localeCompare(b.trialDate ?? ''))
  for (const row of oldestFirst) await enterSheet(deps, clerk, row.id, row.version)
  return rows.length
}

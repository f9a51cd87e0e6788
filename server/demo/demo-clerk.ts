/** What the demo season's clerk did: settled the doubts of the better photos by the paper, and entered what was settled. */
import { readFile } from 'node:fs/promises'
import type { Sheet, Value } from '../../shared/schemas/sheet.ts'
import type { User } from '../../shared/schemas/user.ts'
import { listSheetRows } from '../db/desk/sheet-rows.ts'
import { getSheet } from '../features/sheets/change-sheet.ts'
import { enterSheet } from '../features/sheets/enter.service.ts'
import { settleOneReading } from '../features/sheets/settle.service.ts'
import type { Deps } from '../http/route.ts'
import { type SampleSheet, sampleFile } from './sample-sheets.ts'

/** Sheets with trouble of their own stay at the desk, so that its pages have something true to show. */
const LEFT_AT_THE_DESK = /wrong|crossed|blank|nothing|missing|dirt|pencil|small/

/** A clerk with the paper in hand: keeps what was read right, corrects what was not. */
export async function settleByTruth(deps: Deps, clerk: User, samples: readonly SampleSheet[]): Promise<void> {
  for (const sample of samples.filter((s) => s.sheetCode && !LEFT_AT_THE_DESK.test(s.case))) {
    const truth = await truthOf(sample)
    const { rows } = await listSheetRows(deps.source.manager, { desk: true, search: sample.sheetCode ?? '' })
    for (const row of rows) await settleReadings(deps, clerk, await getSheet(deps, clerk, row.id), truth)
  }
}

async function truthOf(sample: SampleSheet): Promise<Record<string, Value>> {
  const text = await readFile(sampleFile(sample).replace(/\.[a-z]+$/, '.truth.json'), 'utf8').catch(() => '{"readings":{}}')
  return (JSON.parse(text) as { readings: Record<string, Value> }).readings
}

async function settleReadings(deps: Deps, clerk: User, sheet: Sheet, truth: Record<string, Value>): Promise<void> {
  let at = sheet
  for (const reading of sheet.readings.filter((r) => r.state === 'in doubt' && r.settlement === null)) {
    if (!(reading.key in truth)) continue
    const value = truth[reading.key] ?? null
    const { key } = reading
    const settle =
      value === reading.value
        ? ({ how: 'kept', why: '' } as const)
        : value === null
          ? ({ how: 'blank on purpose', why: '' } as const)
          : ({ how: 'corrected', value, why: 'as the paper shows' } as const)
    at = await settleOneReading(deps, clerk, sheet.id, { version: at.version, key, ...settle })
  }
}

/** Enters every sheet on which nothing is open; returns how many. */
export async function enterSettled(deps: Deps, clerk: User): Promise<number> {
  const { rows } = await listSheetRows(deps.source.manager, { state: 'settled' })
  const oldestFirst = [...rows].sort((a, b) => (a.trialDate ?? '').localeCompare(b.trialDate ?? ''))
  for (const row of oldestFirst) await enterSheet(deps, clerk, row.id, row.version)
  return rows.length
}

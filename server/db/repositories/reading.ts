/** Readings of a sheet. What a reading was before stands in the trail. */
import type { Origin, Reading, Settlement, Value, Values } from '../../../shared/schemas/sheet.ts'
import type { Db } from '../database.ts'
import { ReadingEntity } from '../entities/reading.ts'

export type ReadingRow = Pick<
  ReadingEntity,
  'sheetId' | 'key' | 'value' | 'readValue' | 'unit' | 'state' | 'origin' | 'candidates' | 'reasons' | 'pageId' | 'cellRef'
>

export const listReadings = (db: Db, sheetId: string): Promise<ReadingEntity[]> =>
  db.find(ReadingEntity, { where: { sheetId }, order: { key: 'ASC' } })

export const findReading = (db: Db, sheetId: string, key: string): Promise<ReadingEntity | null> =>
  db.findOne(ReadingEntity, { where: { sheetId, key } })

/** Replaces what the reader found; settled readings are the caller's to leave out. */
export async function putReadings(db: Db, rows: readonly ReadingRow[]): Promise<void> {
  if (rows.length === 0) return
  const cleared = { settlement: null, settledBy: null, settledAt: null, why: null }
  await db.upsert(
    ReadingEntity,
    rows.map((row) => ({ ...row, ...cleared })),
    ['sheetId', 'key'],
  )
}

export interface SettledReading {
  sheetId: string
  key: string
  value: Value
  origin: Origin
  settlement: Settlement | null
  settledBy: string | null
  why: string | null
}

export async function settleReading(db: Db, settled: SettledReading): Promise<void> {
  const { sheetId, key, ...change } = settled
  await db.update(ReadingEntity, { sheetId, key }, { ...change, settledAt: change.settlement ? () => 'now()' : null })
}

/** Values by key, as rules and formulas want them. */
export const valuesOf = (rows: ReadonlyArray<Pick<ReadingEntity, 'key' | 'value'>>): Values =>
  Object.fromEntries(rows.map((row) => [row.key, row.value]))

/** A reading waits for a person while the reader doubts it and nobody has settled it. */
export const isOpen = (row: Pick<ReadingEntity, 'state' | 'settlement'>) => row.state === 'in doubt' && row.settlement === null

export const toReading = (row: ReadingEntity, names: ReadonlyMap<string, string>): Reading => ({
  key: row.key,
  value: row.value,
  unit: row.unit,
  state: row.state,
  origin: row.origin,
  candidates: row.candidates,
  reasons: row.reasons,
  pageId: row.pageId,
  cellRef: row.cellRef,
  settlement: row.settlement as Reading['settlement'],
  settledBy: row.settledBy ? (names.get(row.settledBy) ?? null) : null,
  settledAt: row.settledAt?.toISOString() ?? null,
  why: row.why,
  readValue: row.readValue,
})

/** The trial book's rows. A record's versions are added; of an earlier one only the state changes. */
import type { Db } from '../database.ts'
import { RecordEntity } from '../entities/record.ts'

export type NewRecord = Omit<
  RecordEntity,
  'number' | 'version' | 'state' | 'enteredAt' | 'challengedBy' | 'challengedAt' | 'challengeReason'
>

/** Adds the sheet's record, or the next version of it. */
export async function addRecord(db: Db, values: NewRecord): Promise<{ number: number; version: number }> {
  const before = await db.findOne(RecordEntity, { where: { sheetId: values.sheetId }, order: { version: 'DESC' } })
  const number = before?.number ?? (await nextNumber(db))
  const version = (before?.version ?? 0) + 1
  if (before) await db.update(RecordEntity, { number, version: before.version }, { state: 'superseded' })
  await db.insert(RecordEntity, { ...values, number, version, state: 'entered' } as never)
  return { number, version }
}

async function nextNumber(db: Db): Promise<number> {
  const rows: Array<{ n: number }> = await db.query("SELECT nextval('record_number') AS n")
  return rows[0]!.n
}

/** The newest version unless one is named. */
export const findRecord = (db: Db, number: number, version?: number): Promise<RecordEntity | null> =>
  db.findOne(RecordEntity, { where: { number, ...(version === undefined ? {} : { version }) }, order: { version: 'DESC' } })

export const listVersions = (db: Db, number: number): Promise<RecordEntity[]> =>
  db.find(RecordEntity, { where: { number }, order: { version: 'ASC' } })

export async function challengeRecord(db: Db, number: number, version: number, by: string, reason: string): Promise<boolean> {
  const result = await db.update(
    RecordEntity,
    { number, version, state: 'entered' },
    { state: 'challenged', challengedBy: by, challengedAt: () => 'now()', challengeReason: reason },
  )
  return result.affected === 1
}

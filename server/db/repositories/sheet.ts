/** Sheets. Every change names the version it was made on; a stale one changes nothing. */
import { In, Not } from 'typeorm'
import type { QueryDeepPartialEntity } from 'typeorm/query-builder/QueryPartialEntity.js'
import type { Db } from '../database.ts'
import { SheetEntity } from '../entities/sheet.ts'

export type SheetChange = Partial<SheetEntity>
/** TypeORM's own partial type goes into jsonb columns, where it does not belong. */
type Partly = QueryDeepPartialEntity<SheetEntity>

export const findSheet = (db: Db, id: string): Promise<SheetEntity | null> => db.findOne(SheetEntity, { where: { id } })

/** Sheets that carry a code, oldest first, locked until the transaction ends: two pages of one sheet come one after the other. */
export const lockSheetsByCode = (db: Db, code: string): Promise<SheetEntity[]> =>
  db.find(SheetEntity, {
    where: { code, state: Not('set aside') },
    order: { createdAt: 'ASC' },
    lock: { mode: 'pessimistic_write' },
  })

export async function insertSheet(db: Db, values: SheetChange): Promise<string> {
  const result = await db.insert(SheetEntity, values as Partly)
  return result.identifiers[0]!.id as string
}

/** Writes the change and counts the version up, if the sheet still has the version named; false: somebody else wrote first. */
export async function changeSheet(db: Db, id: string, version: number, change: SheetChange): Promise<boolean> {
  const result = await db.update(SheetEntity, { id, version }, { ...change, version: version + 1 } as Partly)
  return result.affected === 1
}

/** For what is nobody's change: counts, holds. The version stays. */
export async function noteOnSheet(db: Db, id: string, change: SheetChange): Promise<void> {
  await db.update(SheetEntity, { id }, change as Partly)
}

/** Takes or renews the hold of one person; false while another holds it. The clock is the database's. */
export async function holdSheet(db: Db, id: string, userId: string, seconds: number): Promise<boolean> {
  const rows: unknown[] = await db.query(
    `UPDATE sheets SET held_since = CASE WHEN held_by = $2 AND held_until > now() THEN held_since ELSE now() END,
       held_by = $2, held_until = now() + make_interval(secs => $3)
     WHERE id = $1 AND (held_by IS NULL OR held_by = $2 OR held_until < now()) RETURNING id`,
    [id, userId, seconds],
  )
  return (rows[0] as unknown[]).length > 0
}

export async function releaseSheet(db: Db, id: string, userId: string): Promise<void> {
  await db.update(SheetEntity, { id, heldBy: userId }, { heldBy: null, heldSince: null, heldUntil: null })
}

/** Earlier pictures of the sheet that could not be read have done their part once one was. */
export async function setAsideUnread(db: Db, ids: readonly string[], reason: string): Promise<void> {
  if (ids.length > 0) await db.update(SheetEntity, { id: In([...ids]) }, { state: 'set aside', reason })
}

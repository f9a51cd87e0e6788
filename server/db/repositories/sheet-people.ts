/** People who have to do with a sheet besides the desk: its owner, and who sent a page of it. */
import type { Db } from '../database.ts'

/** Who sent pages of the sheet, the latest first. */
export async function senderIdsOf(db: Db, sheetId: string): Promise<string[]> {
  const rows: Array<{ id: string }> = await db.query(
    `SELECT u.uploaded_by AS id FROM pages p JOIN uploads u ON u.id = p.upload_id WHERE p.sheet_id = $1
     GROUP BY u.uploaded_by ORDER BY max(u.received_at) DESC`,
    [sheetId],
  )
  return rows.map(({ id }) => id)
}

/** May this demonstrator open the sheet? False also when there is no such sheet. */
export async function isSheetOf(db: Db, sheetId: string, userId: string): Promise<boolean> {
  const rows: unknown[] = await db.query(`SELECT 1 FROM sheets s WHERE s.id = $1 AND ${ofPerson('$2')}`, [sheetId, userId])
  return rows.length === 1
}

/** SQL: the sheet `s` is the person's own, or they sent a page of it. `bound` is the placeholder of their id. */
export const ofPerson = (bound: string) =>
  `(s.owner_id = ${bound} OR EXISTS (SELECT 1 FROM pages sp JOIN uploads su ON su.id = sp.upload_id
     WHERE sp.sheet_id = s.id AND su.uploaded_by = ${bound}))`

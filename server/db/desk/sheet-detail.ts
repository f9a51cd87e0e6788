/** A sheet with everything the desk needs, mapped to what goes over the wire. */
import type { History, Page, Sheet } from '../../../shared/schemas/sheet.ts'
import type { Db } from '../database.ts'
import { TrailEntity } from '../entities/trail.ts'
import { listDoubts, toDoubt } from '../repositories/doubt.ts'
import { listReadings, toReading } from '../repositories/reading.ts'
import { findSheet } from '../repositories/sheet.ts'
import { findSheetRow } from './sheet-rows.ts'

export async function findSheetDetail(db: Db, id: string): Promise<Sheet | null> {
  const row = await findSheetRow(db, id)
  const entity = await findSheet(db, id)
  if (!row || !entity) return null
  const readings = await listReadings(db, id)
  const doubts = await listDoubts(db, id)
  const names = await namesOf(db, [...readings.map((r) => r.settledBy), ...doubts.map((d) => d.settledBy)])
  return {
    ...row,
    layoutVersion: entity.layoutVersion,
    planned: entity.planned,
    pages: await listPages(db, id),
    readings: readings.map((r) => toReading(r, names)),
    doubts: doubts.map((d) => toDoubt(d, names)),
    facts: entity.facts,
    reason: entity.reason,
    history: await historyOf(db, id),
  }
}

export async function namesOf(db: Db, ids: ReadonlyArray<string | null>): Promise<Map<string, string>> {
  const wanted = [...new Set(ids.filter((id): id is string => id !== null))]
  if (wanted.length === 0) return new Map()
  const rows: Array<{ id: string; name: string }> = await db.query('SELECT id, name FROM users WHERE id = ANY($1)', [wanted])
  return new Map(rows.map((r) => [r.id, r.name]))
}

export async function listPages(db: Db, sheetId: string): Promise<Page[]> {
  return db.query(
    `SELECT p.id, p.number, p.upload_id AS "uploadId", u.file_name AS "fileName", p.picture_key IS NOT NULL AS flattened,
       p.take_again AS "takeAgain", nullif(p.placed->'corners', 'null') AS "placedCorners" FROM pages p JOIN uploads u ON u.id = p.upload_id
     WHERE p.sheet_id = $1 ORDER BY u.received_at, p.number`,
    [sheetId],
  )
}

export async function historyOf(db: Db, subjectId: string): Promise<History[]> {
  const lines = await db.find(TrailEntity, { where: { subjectId }, order: { id: 'ASC' } })
  return lines.map(({ at, who, action, text, key }) => ({ at: at.toISOString(), who, action, text, key }))
}

/** What others did to the sheet after the version a writer had in mind. */
export async function changesSince(db: Db, sheetId: string, version: number): Promise<Array<{ path: string; message: string }>> {
  const rows: Array<{ key: string | null; who: string; text: string }> = await db.query(
    `SELECT key, who, text FROM trail WHERE subject_id = $1 AND (details->>'version')::int > $2 ORDER BY id`,
    [sheetId, version],
  )
  return rows.map((r) => ({ path: r.key ?? '', message: `${r.who}: ${r.text}` }))
}

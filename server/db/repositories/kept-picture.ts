/** Stored pictures of a demonstration's sheets, for taking out what shows a person. */

import { In } from 'typeorm'
import type { UploadKind } from '../../../shared/schemas/upload.ts'
import type { Db } from '../database.ts'
import { PageEntity } from '../entities/upload.ts'

export interface KeptPage {
  id: string
  uploadId: string
  number: number
  pictureKey: string | null
  /** Flattened onto this layout; null when the page could not be placed. */
  layout: { key: string; version: number } | null
  /** What the plan knows is printed on it, the farmer's name too. */
  planned: boolean
  /** It shows a sheet of the demonstration; false for another page of the same file. */
  concerned: boolean
}

export interface KeptFile {
  id: string
  kind: UploadKind
  storageKey: string
  pages: KeptPage[]
}

interface Row extends Omit<KeptPage, 'layout'> {
  kind: UploadKind
  storageKey: string
  layoutKey: string | null
  layoutVersion: number | null
}

/** Every file that holds a sheet of the demonstration (or one of these files), with all its pages in their order. */
export async function listKeptFiles(db: Db, of: { demonstrationId: string; uploadId: string | null }): Promise<KeptFile[]> {
  const rows: Row[] = await db.query(
    `WITH theirs AS (
       SELECT s.id FROM sheets s JOIN runs r ON r.id = s.run_id JOIN trials t ON t.id = r.trial_id WHERE t.demonstration_id = $1)
     SELECT p.id, p.upload_id AS "uploadId", p.number, p.picture_key AS "pictureKey", u.kind, u.storage_key AS "storageKey",
       coalesce(p.sheet_id IN (SELECT id FROM theirs), false) AS concerned,
       coalesce(s.planned, false) AS planned, CASE WHEN p.state = 'read' THEN s.layout_key END AS "layoutKey", s.layout_version AS "layoutVersion"
     FROM pages p JOIN uploads u ON u.id = p.upload_id LEFT JOIN sheets s ON s.id = p.sheet_id
     WHERE ($2::uuid IS NULL OR u.id = $2) AND u.storage_key IS NOT NULL AND u.kind IS NOT NULL
       AND p.upload_id IN (SELECT upload_id FROM pages WHERE sheet_id IN (SELECT id FROM theirs))
     ORDER BY p.upload_id, p.number`,
    [of.demonstrationId, of.uploadId],
  )
  const files = new Map<string, KeptFile>()
  for (const { kind, storageKey, layoutKey, layoutVersion, ...page } of rows) {
    const file = files.get(page.uploadId) ?? { id: page.uploadId, kind, storageKey, pages: [] }
    const layout = layoutKey && layoutVersion ? { key: layoutKey, version: layoutVersion } : null
    file.pages.push({ ...page, layout })
    files.set(page.uploadId, file)
  }
  return [...files.values()]
}

/** The page shows this picture from now on, and nothing that was recognised in the typed block. */
export async function replacePicture(db: Db, pageId: string, pictureKey: string | null): Promise<void> {
  await db.query(`UPDATE pages SET picture_key = $2, reading = reading - 'planText' WHERE id = $1`, [pageId, pictureKey])
}

/** null: the file is not kept any more. The hash stays, so that the same file again is still the same file. */
export async function replaceOriginal(
  db: Db,
  uploadId: string,
  file: { kind: UploadKind; storageKey: string; bytes: number } | null,
): Promise<void> {
  await db.query('UPDATE uploads SET storage_key = $2, kind = coalesce($3, kind), bytes = coalesce($4, bytes) WHERE id = $1', [
    uploadId,
    file?.storageKey ?? null,
    file?.kind ?? null,
    file?.bytes ?? null,
  ])
}

/** Demonstrations shown in this file whose farmer was erased: they were planned with one. */
export async function findWithdrawn(db: Db, uploadId: string): Promise<string[]> {
  const rows: { id: string }[] = await db.query(
    `SELECT DISTINCT d.id FROM pages p JOIN sheets s ON s.id = p.sheet_id JOIN runs r ON r.id = s.run_id
       JOIN trials t ON t.id = r.trial_id JOIN demonstrations d ON d.id = t.demonstration_id
     WHERE p.upload_id = $1 AND d.farmer_id IS NULL`,
    [uploadId],
  )
  return rows.map(({ id }) => id)
}

/** Whether a page of the file is still to be read, or being read. */
export async function hasOpenPages(db: Db, uploadId: string): Promise<boolean> {
  return db.existsBy(PageEntity, { uploadId, state: In(['arrived', 'being read']) })
}

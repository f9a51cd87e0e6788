/** Pages of files: handed out one attempt at a time, and looked up for showing. */
import type { UploadKind } from '../../../shared/schemas/upload.ts'
import type { Db } from '../database.ts'
import type { PageEntity } from '../entities/upload.ts'

/** @returns the page's id */
export async function insertPage(db: Db, page: { uploadId: string; number: number }): Promise<string> {
  const rows: Array<{ id: string }> = await db.query('INSERT INTO pages (upload_id, number) VALUES ($1, $2) RETURNING id', [
    page.uploadId,
    page.number,
  ])
  return rows[0]!.id
}

/**
 * The pages of a file, numbered from 1, each with its block or with none.
 * @returns their ids
 */
export async function insertPages(
  db: Db,
  uploadId: string,
  blocks: ReadonlyArray<Record<string, unknown> | null>,
): Promise<string[]> {
  const rows: Array<{ id: string }> = await db.query(
    `INSERT INTO pages (upload_id, number, block)
     SELECT $1, number, nullif(block, 'null') FROM jsonb_array_elements($2::jsonb) WITH ORDINALITY AS b (block, number) RETURNING id`,
    [uploadId, JSON.stringify(blocks)],
  )
  return rows.map((row) => row.id)
}

/** A page in the hands of one attempt. Whatever it writes must name `attemptToken`: a later attempt takes it away. */
export interface TakenPage {
  id: string
  number: number
  attemptToken: string
  /** Counts this one. */
  attempts: number
  block: Record<string, unknown> | null
  placed: PageEntity['placed']
  sheetId: string | null
  /** Its sheet, if it has one already, is a planned one. */
  planned: boolean
  uploadId: string
  fileName: string
  kind: UploadKind
  storageKey: string | null
  /** Of an earlier reading. */
  pictureKey: string | null
}

/**
 * Takes a page for a new attempt, away from any attempt before it.
 * @returns null when it is gone or was read to its end
 */
export async function takePage(db: Db, pageId: string): Promise<TakenPage | null> {
  const [rows]: [TakenPage[], number] = await db.query(
    `UPDATE pages p SET attempt_token = gen_random_uuid(), attempts = p.attempts + 1, state = 'being read'
     FROM uploads u WHERE p.id = $1 AND u.id = p.upload_id AND p.state IN ('arrived', 'being read')
     RETURNING p.id, p.number, p.attempt_token AS "attemptToken", p.attempts, p.block, p.placed, p.sheet_id AS "sheetId",
       coalesce((SELECT planned FROM sheets WHERE id = p.sheet_id), false) AS planned, u.id AS "uploadId", u.file_name AS "fileName", u.kind, u.storage_key AS "storageKey", p.picture_key AS "pictureKey"`,
    [pageId],
  )
  const taken = rows[0] ?? null
  if (taken) await db.query("UPDATE uploads SET state = 'being read' WHERE id = $1 AND state = 'arrived'", [taken.uploadId])
  return taken
}

/** A page to be shown. */
export interface ShownPage {
  id: string
  uploadedBy: string
  sheetId: string | null
  fileName: string
  kind: UploadKind
  storageKey: string | null
  pictureKey: string | null
}

export async function findShownPage(db: Db, pageId: string): Promise<ShownPage | null> {
  const rows: ShownPage[] = await db.query(
    `SELECT p.id, u.uploaded_by AS "uploadedBy", p.sheet_id AS "sheetId", u.file_name AS "fileName", u.kind,
       u.storage_key AS "storageKey", p.picture_key AS "pictureKey"
     FROM pages p JOIN uploads u ON u.id = p.upload_id WHERE p.id = $1`,
    [pageId],
  )
  return rows[0] ?? null
}

/** Is the page still in the hands of this attempt? */
export async function holdsPage(db: Db, page: Pick<TakenPage, 'id' | 'attemptToken'>): Promise<boolean> {
  const rows: unknown[] = await db.query('SELECT 1 FROM pages WHERE id = $1 AND attempt_token = $2', [page.id, page.attemptToken])
  return rows.length === 1
}

/** The upload of a page once all its pages are at their end, when it holds pictures; null otherwise. */
export async function findFinishedPictures(db: Db, pageId: string): Promise<string | null> {
  const rows: Array<{ id: string }> = await db.query(
    `SELECT u.id FROM uploads u JOIN pages p ON p.upload_id = u.id
     WHERE p.id = $1 AND u.state = 'done' AND u.kind NOT IN ('xlsx', 'csv')`,
    [pageId],
  )
  return rows[0]?.id ?? null
}

/**
 * Locks an upload whose pages are to be made.
 * @returns false when it is gone, refused or has its pages already
 */
export async function lockForSplitting(db: Db, uploadId: string): Promise<boolean> {
  const rows: Array<{ pages: number }> = await db.query(
    `SELECT (SELECT count(*) FROM pages WHERE upload_id = u.id) AS pages FROM uploads u
     WHERE id = $1 AND state IN ('arrived', 'being read') FOR UPDATE`,
    [uploadId],
  )
  return rows[0] !== undefined && Number(rows[0].pages) === 0
}

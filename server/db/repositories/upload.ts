/** Files that came in, and what became of their pages. */
import type { SheetState } from '../../../shared/schemas/sheet.ts'
import type { Upload, UploadKind } from '../../../shared/schemas/upload.ts'
import type { Db } from '../database.ts'

export interface NewUpload {
  uploadedBy: string
  fileName: string
  kind: UploadKind | null
  bytes: number
  /** Hexadecimal. */
  sha256: string
  storageKey: string | null
  state: 'arrived' | 'not accepted'
  reason: string | null
  forSheetId: string | null
}

/** The unique index that lets one file in once. */
export const ONCE_INDEX = 'uploads_once'

/** @throws a unique violation of ONCE_INDEX when the same bytes are in already */
export async function insertUpload(db: Db, upload: NewUpload): Promise<string> {
  const { uploadedBy, fileName, kind, bytes, sha256, storageKey, state, reason, forSheetId } = upload
  const rows: Array<{ id: string }> = await db.query(
    `INSERT INTO uploads (uploaded_by, file_name, kind, bytes, sha256, storage_key, state, reason, for_sheet_id)
     VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9) RETURNING id`,
    [uploadedBy, fileName, kind, bytes, sha256, storageKey, state, reason, forSheetId],
  )
  return rows[0]!.id
}

/** The accepted upload of these bytes, whoever sent it; null when they never came. */
export async function findUploadIdBySha(db: Db, sha256: string): Promise<string | null> {
  const rows: Array<{ id: string }> = await db.query("SELECT id FROM uploads WHERE sha256 = $1 AND state <> 'not accepted'", [
    sha256,
  ])
  return rows[0]?.id ?? null
}

/** Files somebody sent in the last `seconds`: the counter every process shares. */
export async function countRecentUploads(db: Db, userId: string, seconds: number): Promise<number> {
  const rows: Array<{ count: number }> = await db.query(
    "SELECT count(*) AS count FROM uploads WHERE uploaded_by = $1 AND received_at > now() - $2 * interval '1 second'",
    [userId, seconds],
  )
  return Number(rows[0]?.count ?? 0)
}

/** What the worker needs of an upload it is to open. */
export interface KeptUpload {
  id: string
  fileName: string
  kind: UploadKind
  storageKey: string
  state: Upload['state']
}

/** null when the row is gone or its bytes were not kept. */
export async function findKeptUpload(db: Db, id: string): Promise<KeptUpload | null> {
  const rows: KeptUpload[] = await db.query(
    `SELECT id, file_name AS "fileName", kind, storage_key AS "storageKey", state
     FROM uploads WHERE id = $1 AND storage_key IS NOT NULL AND kind IS NOT NULL`,
    [id],
  )
  return rows[0] ?? null
}

/** A file that turned out not to be takeable once opened. False when its pages are there already: then it stays. */
export async function refuseUpload(db: Db, id: string, reason: string): Promise<boolean> {
  const rows: [unknown[], number] = await db.query(
    `UPDATE uploads SET state = 'not accepted', reason = $2, storage_key = NULL
     WHERE id = $1 AND state <> 'not accepted' AND NOT EXISTS (SELECT 1 FROM pages WHERE upload_id = $1) RETURNING id`,
    [id, reason],
  )
  return rows[0].length === 1
}

interface UploadRow extends Omit<Upload, 'seenBefore' | 'pages' | 'receivedAt'> {
  receivedAt: Date
  uploadedBy: string
}

interface PageRow {
  id: string
  uploadId: string
  number: number
  state: Upload['pages'][number]['state']
  takeAgain: { code: string; advice: string } | null
  problem: string | null
  sheetId: string | null
  sheetOwnerId: string | null
  code: string | null
  sheetState: SheetState
  openDoubts: number
}

const COLUMNS =
  'id, file_name AS "fileName", kind, bytes, sha256, received_at AS "receivedAt", state, reason, uploaded_by AS "uploadedBy"'

type SentPage = Upload['pages'][number] & { sheetOwnerId: string | null }
/** An upload as it is answered, with who sent it and whose its sheets are. */
export type SentUpload = Omit<Upload, 'pages'> & { uploadedBy: string; pages: SentPage[] }

/** In the order of `ids`; those that do not exist are left out. */
export async function listUploadsById(db: Db, ids: readonly string[]): Promise<SentUpload[]> {
  const rows: UploadRow[] = await db.query(`SELECT ${COLUMNS} FROM uploads WHERE id = ANY($1)`, [ids])
  const found = await withPages(db, rows)
  return ids.flatMap((id) => found.find((upload) => upload.id === id) ?? [])
}

/** Newest first; of one person, or of all with null. */
export async function listUploads(db: Db, options: { uploadedBy: string | null; limit: number }): Promise<SentUpload[]> {
  const rows: UploadRow[] = await db.query(
    `SELECT ${COLUMNS} FROM uploads WHERE $1::uuid IS NULL OR uploaded_by = $1 ORDER BY received_at DESC, id LIMIT $2`,
    [options.uploadedBy, options.limit],
  )
  return withPages(db, rows)
}

async function withPages(db: Db, uploads: UploadRow[]): Promise<SentUpload[]> {
  const pages: PageRow[] = await db.query(
    `SELECT p.id, p.upload_id AS "uploadId", p.number, p.state, p.take_again AS "takeAgain", p.problem,
       s.id AS "sheetId", s.owner_id AS "sheetOwnerId", s.code, s.state AS "sheetState", s.open_doubts AS "openDoubts"
     FROM pages p LEFT JOIN sheets s ON s.id = p.sheet_id WHERE p.upload_id = ANY($1) ORDER BY p.number`,
    [uploads.map((upload) => upload.id)],
  )
  return uploads.map((upload) => ({
    ...upload,
    bytes: Number(upload.bytes),
    receivedAt: upload.receivedAt.toISOString(),
    seenBefore: false,
    pages: pages.filter((page) => page.uploadId === upload.id).map(toPage),
  }))
}

function toPage(row: PageRow): SentPage {
  const { id, number, state, takeAgain, problem, sheetOwnerId } = row
  return {
    id,
    sheetOwnerId,
    number,
    state,
    // A page nobody could read has its reason where the advice stands: one place to look for what to do.
    takeAgain: takeAgain ?? (problem === null ? null : { code: 'unreadable', advice: problem }),
    sheet:
      row.sheetId === null
        ? null
        : { id: row.sheetId, code: row.code, state: row.sheetState, openDoubts: Number(row.openDoubts) },
  }
}

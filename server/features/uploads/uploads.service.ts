/** The door: what may come in is kept, gets its row, its page and its job together; what may not, gets its reason. */
import { randomUUID } from 'node:crypto'
import { readFile } from 'node:fs/promises'
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS, RATE_LIMITS } from '../../../shared/limits.ts'
import type { Upload, UploadKind } from '../../../shared/schemas/upload.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { isUniqueViolation } from '../../db/driver-errors.ts'
import { PHOTO_FIRST, sendJob } from '../../db/queue.ts'
import { insertPage } from '../../db/repositories/page.ts'
import { addTrailLine } from '../../db/repositories/trail.ts'
import {
  countRecentUploads,
  findUploadIdBySha,
  insertUpload,
  listUploads,
  listUploadsById,
  type NewUpload,
  ONCE_INDEX,
  type SentUpload,
} from '../../db/repositories/upload.ts'
import type { Deps } from '../../http/route.ts'
import { checkFile } from './check-file.ts'
import type { ReceivedFile } from './receive.ts'
import { type Refusal, tooLarge } from './refusal.ts'

/** Files that hold several pages are opened by the worker first; a picture is one page from the start. */
const SPLIT_KINDS: ReadonlySet<UploadKind> = new Set(['pdf', 'tiff', 'xlsx', 'csv'])
const LIST_LIMIT = 200

interface Sender {
  actor: User
  forSheetId: string | null
}

/** @throws UserError too_many when somebody sends faster than any season asks for */
export async function checkPace(deps: Deps, actor: User): Promise<void> {
  const count = await countRecentUploads(deps.source.manager, actor.id, 60)
  if (count < RATE_LIMITS.uploads_per_min) return
  const message = `More than ${RATE_LIMITS.uploads_per_min} files in a minute. These were not taken. Send them again in a minute.`
  throw new UserError('too_many', message, { retryAfter_s: 60 })
}

/**
 * Takes the files in, one after the other; each has its own outcome.
 * @throws TransientError when the store or the database cannot take them now: nothing of the file in hand was kept
 */
export async function takeFiles(deps: Deps, sender: Sender, files: readonly ReceivedFile[]): Promise<Upload[]> {
  const { actor } = sender
  if (files.length === 0) throw new UserError('invalid', 'There is no file in the request. Put it in the field "files".')
  const outcomes: Array<{ id: string; seenBefore: boolean }> = []
  for (const file of files) outcomes.push(await takeFile(deps, sender, file))
  const uploads = await listUploadsById(
    deps.source.manager,
    outcomes.map(({ id }) => id),
  )
  return outcomes.flatMap(({ id, seenBefore }, i) => {
    const upload = uploads.find((found) => found.id === id)
    if (!upload) return []
    return [mayFollow(actor, upload) ? { ...toUpload(upload, actor), seenBefore } : strangers(upload, files[i]!.fileName)]
  })
}

async function takeFile(deps: Deps, sender: Sender, file: ReceivedFile): Promise<{ id: string; seenBefore: boolean }> {
  const { manager } = deps.source
  const earlier = await findUploadIdBySha(manager, file.sha256)
  if (earlier) return { id: earlier, seenBefore: true }
  if (file.path === null) {
    const refusal = tooLarge('file', file.bytes, FILE_LIMITS.pdf_bytes, 'Send fewer pages in one file, or a smaller picture.')
    return refuseFile(deps, sender, file, null, refusal)
  }
  const bytes = await readFile(file.path)
  const { kind, refusal } = await checkFile(bytes, file.fileName)
  return refusal ? refuseFile(deps, sender, file, kind, refusal) : acceptFile(deps, sender, file, kind, bytes)
}

async function refuseFile(deps: Deps, sender: Sender, file: ReceivedFile, kind: UploadKind | null, refusal: Refusal) {
  const row = { ...rowOf(sender, file), kind, storageKey: null, state: 'not accepted' as const, reason: refusal.reason }
  return { id: await insertUpload(deps.source.manager, row), seenBefore: false }
}

/** The bytes first: a row without its file would promise what is not there. A file without its row is removed again. */
async function acceptFile(deps: Deps, sender: Sender, file: ReceivedFile, kind: UploadKind, bytes: Buffer) {
  const storageKey = `uploads/${randomUUID()}`
  await deps.files.put(storageKey, bytes)
  try {
    const id = await writeRows(deps, { ...rowOf(sender, file), kind, storageKey, state: 'arrived', reason: null }, sender.actor)
    return { id, seenBefore: false }
  } catch (cause) {
    await deps.files.remove(storageKey)
    const earlier = isUniqueViolation(cause, ONCE_INDEX) ? await findUploadIdBySha(deps.source.manager, file.sha256) : null
    if (earlier) return { id: earlier, seenBefore: true }
    throw cause
  }
}

async function writeRows(deps: Deps, row: NewUpload & { kind: UploadKind }, actor: User): Promise<string> {
  return deps.source.transaction(async (db) => {
    const uploadId = await insertUpload(db, row)
    await addTrailLine(db, { actor, action: 'send in', subject: 'upload', subjectId: uploadId, text: `${row.fileName} arrived` })
    if (SPLIT_KINDS.has(row.kind)) await sendJob(deps.boss, db, 'upload-split', { uploadId })
    else await sendJob(deps.boss, db, 'page-read', { pageId: await insertPage(db, { uploadId, number: 1 }) }, PHOTO_FIRST)
    return uploadId
  })
}

const rowOf = ({ actor, forSheetId }: Sender, { fileName, bytes, sha256 }: ReceivedFile) => ({
  uploadedBy: actor.id,
  fileName,
  bytes,
  sha256,
  forSheetId,
})

/** A demonstrator follows what they sent; the office follows all. */
const mayFollow = (actor: User, upload: SentUpload) => actor.role !== 'demonstrator' || upload.uploadedBy === actor.id

/** A sheet is named only to who may open it: a link to it is never dead. */
const toUpload = ({ uploadedBy, ...upload }: SentUpload, actor: User): Upload => ({
  ...upload,
  pages: upload.pages.map(({ sheetOwnerId, sheet, ...page }) => ({
    ...page,
    sheet: actor.role !== 'demonstrator' || [uploadedBy, sheetOwnerId].includes(actor.id) ? sheet : null,
  })),
})

/** A file somebody else sent before: how far it is, and nothing that is theirs. */
const strangers = ({ uploadedBy: _, ...upload }: SentUpload, fileName: string): Upload => ({
  ...upload,
  fileName,
  seenBefore: true,
  pages: upload.pages.map(({ id, number, state }) => ({ id, number, state, takeAgain: null, sheet: null })),
})

/** Newest first; a demonstrator's own. */
export async function listSent(deps: Deps, actor: User): Promise<Upload[]> {
  const uploadedBy = actor.role === 'demonstrator' ? actor.id : null
  return (await listUploads(deps.source.manager, { uploadedBy, limit: LIST_LIMIT })).map((upload) => toUpload(upload, actor))
}

/** @throws UserError not_found, also for a demonstrator asking for somebody else's */
export async function getSent(deps: Deps, actor: User, id: string): Promise<Upload> {
  const [upload] = await listUploadsById(deps.source.manager, [id])
  if (upload && mayFollow(actor, upload)) return toUpload(upload, actor)
  throw new UserError('not_found', 'There is no such file.')
}

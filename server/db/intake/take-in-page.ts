/**
 * A page that was read becomes part of a sheet. One transaction, fenced: an attempt that lost its token writes nothing, so a
 * page that was handed out twice is taken in once.
 */
import { shortReasonOf } from '../../../shared/reading/locate/take-again.ts'
import type { Db } from '../database.ts'
import { type SheetEntity, SheetEntity as Sheets } from '../entities/sheet.ts'
import type { PageEntity } from '../entities/upload.ts'
import { PageEntity as Pages, UploadEntity } from '../entities/upload.ts'
import { keptReading } from '../repositories/page-readings.ts'
import { listReadings } from '../repositories/reading.ts'
import { insertSheet, lockSheetsByCode, noteOnSheet, setAsideUnread } from '../repositories/sheet.ts'
import { addTrailLine } from '../repositories/trail.ts'
import { fillSheet } from './fill-sheet.ts'
import { joinSheet } from './join-sheet.ts'
import type { PageOutcome } from './page-outcome.ts'
import { sameInk } from './same-ink.ts'

type ReadPage = Extract<PageOutcome, { kind: 'read' }>

interface Taken {
  /** false: another attempt has the page; nothing was written. */
  written: boolean
  sheetId: string | null
}

/** Call inside a transaction. */
export async function takeInPage(db: Db, input: { pageId: string; attemptToken: string; outcome: PageOutcome }): Promise<Taken> {
  const { pageId, attemptToken, outcome } = input
  const state = outcome.kind === 'read' ? 'read' : outcome.kind
  const fenced = await db
    .createQueryBuilder()
    .update(Pages)
    .set({
      state,
      attemptToken: null,
      readAt: () => 'now()',
      takeAgain: outcome.kind === 'take again' ? { code: outcome.code, advice: outcome.advice } : null,
      problem: outcome.kind === 'unreadable' ? outcome.reason : null,
      ...(outcome.kind === 'read' ? { reading: keptReading(outcome) as never } : {}),
      ...('pictureKey' in outcome && outcome.pictureKey ? { pictureKey: outcome.pictureKey } : {}),
    })
    .where({ id: pageId, attemptToken })
    .execute()
  if (fenced.affected !== 1) return { written: false, sheetId: null }
  const page = await db.findOneOrFail(Pages, { where: { id: pageId } })
  const upload = await db.findOneOrFail(UploadEntity, { where: { id: page.uploadId } })
  const sheetId =
    outcome.kind === 'read' ? await takeInRead(db, page, upload, outcome) : await takeInUnread(db, page, upload, outcome)
  if (outcome.kind !== 'read') await db.update(Pages, { id: pageId }, { sheetId })
  await closeUpload(db, upload.id)
  return { written: true, sheetId }
}

async function takeInRead(db: Db, page: PageEntity, upload: UploadEntity, read: ReadPage): Promise<string> {
  if (page.sheetId) return refill(db, page.sheetId, page, read)
  const known = read.sheetCode ? await lockSheetsByCode(db, read.sheetCode) : []
  const asked = upload.forSheetId ? known.find((s) => s.id === upload.forSheetId) : undefined
  const awaited = asked ?? known.find((s) => ['printed', 'sent back', 'unreadable'].includes(s.state))
  if (awaited) {
    await setAsideUnread(
      db,
      known.filter((s) => s.state === 'unreadable' && s.id !== awaited.id).map((s) => s.id),
      'a later picture could be read',
    )
    return fillSheet(db, awaited, page, upload, read)
  }
  for (const sheet of known) {
    const readings = await listReadings(db, sheet.id)
    if (
      sameInk(
        readings.map((r) => ({ key: r.key, value: r.readValue, state: r.state })),
        read.readings,
      )
    ) {
      return joinSheet(db, sheet, readings, page, upload, read)
    }
  }
  const first: SheetEntity | undefined = known[0]
  const id = await insertSheet(db, {
    code: read.sheetCode,
    state: 'arrived',
    runId: first?.runId ?? null,
    planned: read.planned,
    facts: {},
  })
  return fillSheet(db, { id, state: 'arrived', runId: first?.runId ?? null }, page, upload, read)
}

/** A page that a clerk placed by hand, or that is read again, belongs to its sheet already. */
async function refill(db: Db, sheetId: string, page: PageEntity, read: ReadPage): Promise<string> {
  const upload = await db.findOneOrFail(UploadEntity, { where: { id: page.uploadId } })
  const { runId } = await db.findOneOrFail(Sheets, { where: { id: sheetId } })
  return fillSheet(db, { id: sheetId, state: 'being read', runId }, page, upload, read)
}

/** No reading, but nothing is lost: the picture waits at the desk, where a person can place it by hand. */
async function takeInUnread(
  db: Db,
  page: PageEntity,
  upload: UploadEntity,
  outcome: Exclude<PageOutcome, ReadPage>,
): Promise<string> {
  const reason = page.placed ? reasonForDesk(outcome) : outcome.kind === 'take again' ? outcome.advice : outcome.reason
  const code = outcome.kind === 'take again' ? (outcome.sheetCode ?? null) : null
  const known = code && !page.sheetId ? await lockSheetsByCode(db, code) : []
  const ownerId = known.find((s) => s.runId !== null)?.ownerId ?? upload.uploadedBy
  const origin = originOf(upload)
  const id = page.sheetId ?? (await insertSheet(db, { code, state: 'unreadable', facts: {}, ownerId, origin }))
  await noteOnSheet(db, id, { state: 'unreadable', reason, firstDoubt: reason, arrivedAt: upload.receivedAt })
  await addTrailLine(db, { actor: null, action: outcome.kind, subject: 'sheet', subjectId: id, text: reason })
  return id
}

/** The advice to whoever holds the phone is of no use to a clerk who has set the corners. */
function reasonForDesk(outcome: Exclude<PageOutcome, ReadPage>): string {
  const why = outcome.kind === 'take again' ? shortReasonOf(outcome.code) : null
  return `It could not be read from these corners${why ? `: ${why}` : ''}. Key it beside the picture, or send it back.`
}

const originOf = ({ kind }: UploadEntity) => (kind === 'xlsx' || kind === 'csv' ? 'spreadsheet' : 'photo')

async function closeUpload(db: Db, uploadId: string): Promise<void> {
  await db.query(
    `UPDATE uploads SET state = 'done' WHERE id = $1 AND NOT EXISTS
       (SELECT 1 FROM pages WHERE upload_id = $1 AND state IN ('arrived', 'being read'))`,
    [uploadId],
  )
}

/** Reads one page and has it taken in. Whatever this attempt writes, it writes only while the page is still its own. */
import type { DataSource, Db } from '../../server/db/database.ts'
import type { PageOutcome } from '../../server/db/intake/page-outcome.ts'
import { takeInPage } from '../../server/db/intake/take-in-page.ts'
import { findFinishedPictures, holdsPage, type TakenPage, takePage } from '../../server/db/repositories/page.ts'
import { blankLateArrival } from '../../server/print/blank-pictures.ts'
import type { FileStore } from '../../server/storage/store.ts'
import { uprightKey } from '../../server/storage/upright-key.ts'
import { defineJob, type JobContext, type JobEnd, type JobHandler } from './job-handler.ts'
import type { PageReader, ReadPicture } from './page-reader.ts'
import { readBlock } from './read-block.ts'

export interface PageReadDeps {
  source: DataSource
  files: FileStore
  reader: PageReader
}

/** Attempts a page gets; as many workers a file may kill. */
export const MOST_ATTEMPTS = 3

const GIVEN_UP =
  'Three attempts to read this page ended without a result, so the file is likely damaged. The file is kept. Take the photo again, or key the sheet beside the picture.'

export function pageReadJob(deps: PageReadDeps): JobHandler {
  return defineJob({
    name: 'page-read',
    handle: async ({ pageId }, context) => {
      const end = await readPage(deps, pageId, context)
      if (end === 'done') await coverWithdrawn(deps, pageId)
      return end
    },
    giveUp: async ({ pageId }) => {
      const page = await takePage(deps.source.manager, pageId)
      if (page) await keep(deps, page, { outcome: { kind: 'unreadable', reason: GIVEN_UP }, picture: null })
      // The page may have been read, and only the covering failed each time: here it is tried on for days.
      await coverWithdrawn(deps, pageId)
    },
  })
}

/**
 * A sheet photographed after its farmer asked to be erased is covered as soon as the last page of its file is read; an attempt
 * that died in between is repeated, finds the page read, and comes past here again.
 */
async function coverWithdrawn(deps: PageReadDeps, pageId: string): Promise<void> {
  const uploadId = await findFinishedPictures(deps.source.manager, pageId)
  if (uploadId) await blankLateArrival(deps, uploadId)
}

async function readPage(deps: PageReadDeps, pageId: string, { signal }: JobContext): Promise<JobEnd> {
  const page = await takePage(deps.source.manager, pageId)
  if (!page) return 'done'
  if (page.attempts > MOST_ATTEMPTS) return keep(deps, page, { outcome: { kind: 'unreadable', reason: GIVEN_UP }, picture: null })
  try {
    return await keep(deps, page, await read(deps, page, signal))
  } catch (cause) {
    if (!(await holdsPage(deps.source.manager, page))) return 'late'
    throw cause
  }
}

async function read(deps: PageReadDeps, page: TakenPage, signal: AbortSignal): Promise<ReadPicture> {
  if (page.block) return { outcome: readBlock(page.block), picture: null }
  if (page.storageKey === null) throw new Error(`page ${page.id} has neither a block nor a file`)
  const bytes = await deps.files.get(page.storageKey)
  const { fileName, kind, number, placed, planned } = page
  return deps.reader.read({ bytes, fileName, kind, page: number, placed, planned }, signal)
}

/**
 * The picture first, then all rows in one transaction. A picture whose rows were refused is removed again, and so is the one
 * it replaces; when the answer to the commit is lost, it stays, because rows may name it.
 */
async function keep(deps: PageReadDeps, page: TakenPage, { outcome, picture, upright }: ReadPicture): Promise<JobEnd> {
  const pictureKey = picture ? `pictures/${page.id}/${page.attemptToken}` : null
  if (picture && pictureKey) await deps.files.put(pictureKey, picture)
  // The same for every attempt, so no attempt can spoil it for another.
  if (upright) await deps.files.put(uprightKey(page.id), upright)
  const written = await deps.source.transaction((db) => write(db, page, withPicture(outcome, pictureKey)))
  const stale = written ? page.pictureKey : pictureKey
  if (pictureKey && stale) await deps.files.remove(stale)
  if (written && outcome.kind === 'read' && !page.block) await deps.files.remove(uprightKey(page.id))
  return written ? 'done' : 'late'
}

const write = async (db: Db, page: TakenPage, outcome: PageOutcome) =>
  (await takeInPage(db, { pageId: page.id, attemptToken: page.attemptToken, outcome })).written

const withPicture = (outcome: PageOutcome, pictureKey: string | null): PageOutcome =>
  outcome.kind === 'unreadable' || pictureKey === null ? outcome : { ...outcome, pictureKey }

/** Takes a person out of every stored picture of a demonstration's sheets. */
import { randomUUID } from 'node:crypto'
import { findLayout } from '../../shared/layouts/registry.ts'
import type { UploadKind } from '../../shared/schemas/upload.ts'
import type { DataSource, Db } from '../db/database.ts'
import {
  findWithdrawn,
  hasOpenPages,
  type KeptFile,
  type KeptPage,
  listKeptFiles,
  replaceOriginal,
  replacePicture,
} from '../db/repositories/kept-picture.ts'
import { addTrailLine } from '../db/repositories/trail.ts'
import type { FileStore } from '../storage/store.ts'
import { uprightKey } from '../storage/upright-key.ts'
import { blankAreas } from './blank-areas.ts'
import { picturesAsPdf } from './pictures-pdf.ts'

const SPREADSHEETS: readonly UploadKind[] = ['xlsx', 'csv']

interface Kept {
  source: DataSource
  files: FileStore
}

/** What was done, for the trail. */
export interface Blanked {
  pages: number
  /** Originals that were replaced by their flattened, blanked pages. */
  replaced: number
  /** Pictures that could not be placed on a layout, and were removed whole. */
  removed: number
  /** Writes the rows; what they named before goes once they are written. */
  write(db: Db): Promise<void>
  /** Keys nobody names any more. */
  stale: string[]
}

/**
 * Covers the personal areas. No page of the files may still wait to be read. The old files are overwritten before any row changes: whatever fails after that, nobody is shown
 * any more, and doing it again ends the work. New keys are given besides, since browsers keep a picture under its key.
 */
export async function blankPictures(deps: Kept, demonstrationId: string, uploadId: string | null = null): Promise<Blanked> {
  const found = await listKeptFiles(deps.source.manager, { demonstrationId, uploadId })
  const files = found.filter(({ kind }) => !SPREADSHEETS.includes(kind))
  const steps: ((db: Db) => Promise<void>)[] = []
  const done: Blanked = { pages: 0, replaced: 0, removed: 0, stale: [], write: (db) => inTurn(steps, db) }
  for (const file of files) {
    const kept: (Buffer | null)[] = []
    for (const page of file.pages) {
      kept.push(page.concerned ? await blankPage(deps.files, page, steps, done) : await pictureOf(deps.files, page))
    }
    steps.push(await replaceFile(deps.files, file, kept))
    done.replaced += 1
    done.stale.push(file.storageKey)
  }
  return done
}

async function inTurn(steps: readonly ((db: Db) => Promise<void>)[], db: Db): Promise<void> {
  for (const step of steps) await step(db)
}

const pictureOf = async (store: FileStore, page: KeptPage) => (page.pictureKey ? store.get(page.pictureKey) : null)

async function blankPage(
  store: FileStore,
  page: KeptPage,
  steps: ((db: Db) => Promise<void>)[],
  done: Blanked,
): Promise<Buffer | null> {
  const layout = page.layout && findLayout(page.layout.key, page.layout.version)
  const before = await pictureOf(store, page)
  if (page.pictureKey) done.stale.push(page.pictureKey)
  await store.remove(uprightKey(page.id))
  if (!layout || !before) {
    done.removed += 1
    if (page.pictureKey) await store.remove(page.pictureKey)
    steps.push((db) => replacePicture(db, page.id, null))
    return null
  }
  const blanked = await blankAreas(before, layout, page.planned)
  const key = `pictures/${page.id}/${randomUUID()}`
  await store.put(key, blanked)
  if (page.pictureKey) await store.put(page.pictureKey, blanked)
  steps.push((db) => replacePicture(db, page.id, key))
  done.pages += 1
  return blanked
}

/** The original becomes its own flattened pages: a JPEG, or a PDF of as many pages as it had. */
async function replaceFile(
  store: FileStore,
  file: KeptFile,
  kept: readonly (Buffer | null)[],
): Promise<(db: Db) => Promise<void>> {
  const [first] = kept.filter((picture) => picture !== null)
  if (!first) {
    await store.remove(file.storageKey)
    return (db) => replaceOriginal(db, file.id, null)
  }
  const bytes = kept.length === 1 ? first : await picturesAsPdf('Blanked pages', kept)
  const kind: UploadKind = kept.length === 1 ? 'jpeg' : 'pdf'
  const storageKey = `uploads/${randomUUID()}`
  await store.put(storageKey, bytes)
  await store.put(file.storageKey, bytes)
  return (db) => replaceOriginal(db, file.id, { kind, storageKey, bytes: bytes.length })
}

/**
 * For a file whose page was just read: covers it at once when its farmer has withdrawn consent before it came in.
 * @returns whether it had to be covered
 */
export async function blankLateArrival(deps: Kept, uploadId: string): Promise<boolean> {
  const withdrawn = await findWithdrawn(deps.source.manager, uploadId)
  // The pages still to be read are read from the original: the last of them has it covered.
  if (await hasOpenPages(deps.source.manager, uploadId)) return false
  for (const demonstrationId of withdrawn) {
    const blanked = await blankPictures(deps, demonstrationId, uploadId)
    await deps.source.transaction(async (db) => {
      await blanked.write(db)
      const text = `A picture came in after consent was withdrawn: blanked ${blanked.pages}, not placed and removed ${blanked.removed}`
      await addTrailLine(db, { actor: null, action: 'blank', subject: 'demonstration', subjectId: demonstrationId, text })
    })
    for (const key of blanked.stale) await deps.files.remove(key)
  }
  return withdrawn.length > 0
}

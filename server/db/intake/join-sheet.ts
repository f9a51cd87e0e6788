/** Another picture of a sheet whose ink is known already. */
import type { Db } from '../database.ts'
import type { ReadingEntity } from '../entities/reading.ts'
import type { SheetEntity } from '../entities/sheet.ts'
import { type PageEntity, PageEntity as Pages, type UploadEntity } from '../entities/upload.ts'
import { listPictureReadings } from '../repositories/page-readings.ts'
import { putReadings, type ReadingRow } from '../repositories/reading.ts'
import { addTrailLine } from '../repositories/trail.ts'
import { type BestReading, bestOfPictures, PICTURES_DIFFER, type PictureReadings } from './best-of-pictures.ts'
import type { PageOutcome } from './page-outcome.ts'
import { recheckSheet } from './recheck-sheet.ts'
import { sameInk } from './same-ink.ts'

type ReadPage = Extract<PageOutcome, { kind: 'read' }>

/**
 * Another picture of the same ink: every cell is weighed anew over all its pictures. What a person settled, and what the plan
 * knows, stays as it is; so does a sheet that is out of the desk's hands.
 */
export async function joinSheet(
  db: Db,
  sheet: SheetEntity,
  readings: readonly ReadingEntity[],
  page: PageEntity,
  upload: UploadEntity,
  read: ReadPage,
): Promise<string> {
  const kept = await listPictureReadings(db, sheet.id)
  const before = kept.length > 0 ? kept : [asPicture(sheet.id, readings)]
  const own: PictureReadings = { pageId: page.id, fileName: upload.fileName, readings: read.readings }
  // Ink may have been added since an old picture was taken: only pictures of this ink are weighed.
  const best = bestOfPictures([...before.filter((picture) => sameInk(picture.readings, read.readings)), own])
  const changed = ['waiting', 'settled'].includes(sheet.state) ? readings.flatMap((row) => change(row, best.get(row.key))) : []
  await putReadings(db, changed)
  await db.update(Pages, { id: page.id }, { sheetId: sheet.id })
  await recheckSheet(db, sheet.id)
  const clear = changed.filter((r) => r.state === 'clear').length
  const differing = changed.filter((r) => r.reasons.some((reason) => reason.rule === PICTURES_DIFFER)).length
  const text = `${upload.fileName} shows the same ink and joins the sheet; ${clear} readings in doubt are clear in it${
    differing > 0 ? `, ${differing} differ between the pictures` : ''
  }`
  await addTrailLine(db, {
    actor: null,
    action: 'joined',
    subject: 'sheet',
    subjectId: sheet.id,
    text,
    details: {
      keys: changed.map((r) => r.key),
      before: readings
        .filter((r) => changed.some((c) => c.key === r.key))
        .map(({ key, value, state }) => ({ key, value, state })),
    },
  })
  return sheet.id
}

/** A sheet read before readings were kept with their pages: what stands on it is what its pictures say. */
const asPicture = (sheetId: string, rows: readonly ReadingEntity[]): PictureReadings => ({
  pageId: rows.find((row) => row.pageId !== null)?.pageId ?? sheetId,
  fileName: 'the picture before',
  readings: rows.map(({ key, readValue, unit, state, candidates, reasons, cellRef }) => ({
    key,
    value: readValue,
    unit,
    state,
    candidates,
    reasons,
    cellRef,
  })),
})

/** The row as the pictures together have it, where that says something new; a clear reading that stays as it was keeps its page. */
function change(row: ReadingEntity, best: BestReading | undefined): ReadingRow[] {
  if (!best || row.settlement !== null || row.origin !== 'ink') return []
  if (row.state === best.state && row.value === best.value) return []
  return [{ ...best, sheetId: row.sheetId, readValue: best.value, origin: 'ink' }]
}

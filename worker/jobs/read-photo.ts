/** The photo reader as the page job asks for it: made when the first picture comes, kept for the process. */
import type { PageOutcome } from '../../server/db/intake/page-outcome.ts'
import { UserError } from '../../shared/errors.ts'
import type { PageReading } from '../../shared/schemas/page-reading.ts'
import type { PhotoReader } from '../readers/photo/read-page.ts'
import type { PagePicture, PageReader, ReadPicture } from './page-reader.ts'

export function createPageReader(): PageReader {
  let making: Promise<PhotoReader> | undefined
  const reader = () => {
    making ??= import('../readers/photo/read-page.ts').then((module) => module.createPhotoReader())
    // A reader that could not be made is made anew for the next page.
    making.catch(() => {
      making = undefined
    })
    return making
  }
  return {
    read: async (picture) => readPicture(await reader(), picture),
    close: async () => {
      await (await making)?.close()
    },
  }
}

async function readPicture(reader: PhotoReader, picture: PagePicture): Promise<ReadPicture> {
  try {
    const pages = await reader.read(picture.bytes, picture.fileName)
    const page = pages.find((reading) => reading.page === picture.page)
    if (!page) return { outcome: { kind: 'unreadable', reason: `The file has no page ${picture.page}.` }, picture: null }
    return { outcome: toOutcome(page), picture: null }
  } catch (cause) {
    // What the reader says of a file in words for its sender is a result; anything else is a fault and tried again.
    if (cause instanceof UserError)
      return { outcome: { kind: 'take again', code: cause.code, advice: cause.message }, picture: null }
    throw cause
  }
}

function toOutcome(page: PageReading): PageOutcome {
  if (page.takeAgain) return { kind: 'take again', ...page.takeAgain, sheetCode: page.sheet }
  if (page.layout === null || page.version === null) return { kind: 'unreadable', reason: 'No sheet was found in this picture.' }
  return {
    kind: 'read',
    layout: page.layout,
    layoutVersion: page.version,
    planned: page.planned,
    sheetCode: page.sheet,
    origin: 'photo',
    readings: Object.entries(page.readings).map(([key, { quad: _, ...reading }]) => ({ key, ...reading, cellRef: null })),
    planText: page.planText,
  }
}

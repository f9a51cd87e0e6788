/** The photo reader as the page job asks for it: made when the first picture comes, kept for the process. */
import type { PageOutcome } from '../../server/db/intake/page-outcome.ts'
import type { KnownNumbers } from '../../server/db/repositories/known-numbers.ts'
import { UserError } from '../../shared/errors.ts'
import type { PageCell, PageReading } from '../../shared/schemas/page-reading.ts'
import type { ByHand, PhotoReader, ReadHooks } from '../readers/photo/read-page.ts'
import type { PagePicture, PageReader, ReadPicture } from './page-reader.ts'

/** @param listKnown the numbers that registers hold, asked for each page: they change while the process runs */
export function createPageReader(listKnown: () => Promise<KnownNumbers>): PageReader {
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
    read: async (picture) => readPicture(await reader(), picture, await listKnown()),
    close: async () => {
      await (await making)?.close()
    },
  }
}

async function readPicture(reader: PhotoReader, picture: PagePicture, known: KnownNumbers): Promise<ReadPicture> {
  let flattened: Uint8Array | null = null
  const hooks: ReadHooks = {
    known,
    page: picture.page,
    onFlattened: (_page, jpeg) => {
      flattened = jpeg
    },
  }
  const byHand = byHandOf(picture)
  try {
    const page = byHand
      ? await reader.readWithCorners(picture.bytes, picture.fileName, byHand, hooks)
      : (await reader.read(picture.bytes, picture.fileName, hooks))[0]
    if (page) return { outcome: toOutcome(page), picture: flattened }
    return { outcome: { kind: 'unreadable', reason: `The file has no page ${picture.page}.` }, picture: null }
  } catch (cause) {
    // What the reader says of a file in words for its sender is a result; anything else is a fault and tried again.
    if (cause instanceof UserError)
      return { outcome: { kind: 'take again', code: cause.code, advice: cause.message }, picture: null }
    throw cause
  }
}

function byHandOf({ placed, planned }: PagePicture): ByHand | null {
  const [a, b, c, d] = placed?.corners ?? []
  if (!placed || !a || !b || !c || !d) return null
  const corners = [a, b, c, d].map(([x, y]) => ({ x, y })) as unknown as ByHand['corners']
  return { layout: placed.layout, version: placed.layoutVersion, sheetCode: placed.sheetCode, planned, corners }
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
    readings: Object.entries(page.readings).map(([key, { quad: _, ...cell }]) => ({
      key,
      ...cell,
      reasons: ownReasons(cell),
      cellRef: null,
    })),
    planText: page.planText,
  }
}

/** Rules the reader itself applies besides its own (R..): a gap between digits, a unit that is missing or ticked twice. */
const READER_RULES = new Set(['Q16', 'Q55'])

/** The printed document also carries what the checks find; the intake runs them anew, with what the registers know. */
const ownReasons = ({ state, reasons }: Pick<PageCell, 'state' | 'reasons'>) =>
  reasons.filter(({ rule }) => rule.startsWith('R') || (state === 'in doubt' && READER_RULES.has(rule)))

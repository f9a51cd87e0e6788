/** From the photo reader's words to those of the intake. */
import type { PageOutcome } from '../../server/db/intake/page-outcome.ts'
import type { KnownNumbers } from '../../server/db/repositories/known-numbers.ts'
import { UserError } from '../../shared/errors.ts'
import type { PageCell, PageReading } from '../../shared/schemas/page-reading.ts'
import type { UploadKind } from '../../shared/schemas/upload.ts'
import type { PagePicture, ReadPicture } from '../jobs/page-reader.ts'
import type { ByHand, PhotoReader, ReadHooks } from '../readers/photo/read-page.ts'
import { drawUpright } from './draw-upright.ts'

/** One page of one file: read, or the words for why not. @throws what is a fault and worth another attempt */
export async function readPicture(reader: PhotoReader, picture: PagePicture, known: KnownNumbers): Promise<ReadPicture> {
  let flattened: Uint8Array | null = null
  const hooks: ReadHooks = {
    known,
    page: picture.page,
    planText: true,
    onFlattened: (_page, jpeg) => {
      flattened = jpeg
    },
  }
  const byHand = byHandOf(picture)
  try {
    const page = byHand
      ? await reader.readWithCorners(picture.bytes, picture.fileName, byHand, hooks)
      : (await reader.read(picture.bytes, picture.fileName, hooks))[0]
    if (page) return { outcome: toOutcome(page), picture: flattened, ...(page.takeAgain ? await uprightOf(picture) : {}) }
    return { outcome: { kind: 'unreadable', reason: `The file has no page ${picture.page}.` }, picture: null }
  } catch (cause) {
    // What the reader says of a file in words for its sender is a result; anything else is a fault and tried again.
    if (cause instanceof UserError)
      return { outcome: { kind: 'take again', code: cause.code, advice: cause.message }, picture: null }
    throw cause
  }
}

/** Kinds that browsers do not show in an image element. */
const NOT_SHOWN: ReadonlySet<UploadKind> = new Set(['heic', 'tiff', 'pdf'])

async function uprightOf({ bytes, kind, page }: PagePicture): Promise<{ upright?: Uint8Array }> {
  return NOT_SHOWN.has(kind) ? { upright: await drawUpright(bytes, page) } : {}
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

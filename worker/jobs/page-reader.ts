/** What the page job asks of the photo reader: the real one is worker/child/reading-process.ts, tests hand in a fake. */
import type { PageEntity } from '../../server/db/entities/upload.ts'
import type { PageOutcome } from '../../server/db/intake/page-outcome.ts'
import type { UploadKind } from '../../shared/schemas/upload.ts'

export interface PagePicture {
  bytes: Uint8Array
  fileName: string
  kind: UploadKind
  /** From 1. */
  page: number
  /** Where a clerk placed the page by hand. */
  placed: PageEntity['placed']
  /** The sheet it was placed on is a planned one: no number boxes in its head. */
  planned: boolean
}

export interface ReadPicture {
  outcome: PageOutcome
  /** The flattened page as JPEG, when it could be placed. */
  picture: Uint8Array | null
  /** The page upright as JPEG, in the pixels corners are set in, when it could not be read and browsers cannot show its file. */
  upright?: Uint8Array
}

export interface PageReader {
  /** An unreadable picture is an outcome; what is thrown is a fault, and the page is tried again. */
  read(picture: PagePicture, signal: AbortSignal): Promise<ReadPicture>
  close(): Promise<void>
}

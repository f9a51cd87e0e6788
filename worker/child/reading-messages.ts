/** What worker and reading process say to each other; bytes and sets travel as they are (structured clone). */
import type { KnownNumbers } from '../../server/db/repositories/known-numbers.ts'
import type { PagePicture, ReadPicture } from '../jobs/page-reader.ts'

export interface ReadingRequest {
  id: number
  picture: PagePicture
  known: KnownNumbers
}

export type ReadingAnswer = { id: number; read: ReadPicture } | { id: number; fault: string }

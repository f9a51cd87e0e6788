/** What a download holds, whatever it is written as. */
import type { Column } from '../../shared/layouts/column.ts'
import type { Value } from '../../shared/schemas/sheet.ts'

export type Line = readonly Value[]

export interface Table {
  /** The file's name without its ending, and the worksheet's. */
  name: string
  /** In the order of the values of a line. */
  columns: readonly Column[]
  /** Some lines at a time: to wait for each by itself would cost more than to write it. */
  lines: AsyncIterable<readonly Line[]>
}

/** Pieces of a file, a few dozen kilobytes each. */
export type Pieces = AsyncGenerator<Buffer>

const PIECE_CHARS = 64 * 1024

/** Gathers small texts into pieces worth sending; the first goes at once, so that whoever waits sees that something comes. */
export async function* piecesOf(texts: AsyncIterable<string>): Pieces {
  let gathered = ''
  let sent = false
  for await (const text of texts) {
    gathered += text
    if (sent && gathered.length < PIECE_CHARS) continue
    yield Buffer.from(gathered)
    gathered = ''
    sent = true
  }
  if (gathered !== '') yield Buffer.from(gathered)
}

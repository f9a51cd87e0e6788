import { headerOf } from '../../shared/layouts/column.ts'
import { csvLine, dataLine } from './csv-text.ts'
import { type Pieces, piecesOf, type Table } from './table.ts'

/** CSV (RFC 4180, UTF-8): units in the heading, numbers untouched, text that a spreadsheet would run made harmless. */
export const csvOf = (table: Table): Pieces => piecesOf(linesOf(table))

async function* linesOf({ columns, lines }: Table): AsyncGenerator<string> {
  yield csvLine(columns.map(headerOf))
  for await (const some of lines) yield some.map(dataLine).join('')
}

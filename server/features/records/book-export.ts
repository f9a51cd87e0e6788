/** The trial book as CSV and XLSX: streamed, units in the header, numbers untouched, text that a spreadsheet would run made harmless. */
import type { Response } from 'express'
import { type BookColumn, bookColumns, headerOf } from '../../../shared/layouts/book-columns.ts'
import { LAYOUTS } from '../../../shared/layouts/registry.ts'
import type { Value } from '../../../shared/schemas/sheet.ts'
import type { Db } from '../../db/database.ts'
import { type BookLine, bookLines } from '../../db/desk/book-lines.ts'
import type { RecordFilter } from '../../db/desk/record-rows.ts'
import { csvLine, dataLine, safeText } from '../../print/csv-text.ts'

const NAME = 'trial-book'
const columns = () => bookColumns(LAYOUTS)

export function cellOf(column: BookColumn, line: BookLine): Value {
  const { source } = column
  if (source.from === 'record') return line.fields[source.field] ?? null
  if (source.from === 'reading') return line.readings[source.key] ?? null
  return line.results[source.key]?.[source.part] ?? null
}

export async function sendCsv(db: Db, filter: RecordFilter, res: Response): Promise<void> {
  res.set({ 'Content-Type': 'text/csv; charset=utf-8', 'Content-Disposition': `attachment; filename="${NAME}.csv"` })
  const all = columns()
  res.write(csvLine(all.map(headerOf)))
  for await (const line of bookLines(db, filter)) res.write(dataLine(all.map((c) => cellOf(c, line))))
  res.end()
}

export async function sendXlsx(db: Db, filter: RecordFilter, res: Response): Promise<void> {
  const { default: Excel } = await import('exceljs')
  res.set({
    'Content-Type': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
    'Content-Disposition': `attachment; filename="${NAME}.xlsx"`,
  })
  const workbook = new Excel.stream.xlsx.WorkbookWriter({ stream: res, useStyles: true })
  const all = columns()
  const book = workbook.addWorksheet('Trial book', { views: [{ state: 'frozen', xSplit: 1, ySplit: 1 }] })
  book.columns = all.map((c) => ({ header: headerOf(c), key: c.name, width: Math.max(10, headerOf(c).length + 1) }))
  book.getRow(1).font = { bold: true }
  for await (const line of bookLines(db, filter)) book.addRow(all.map((c) => xlsxCell(cellOf(c, line)))).commit()
  book.commit()
  const dictionary = workbook.addWorksheet('Dictionary')
  for (const row of dictionaryRows()) dictionary.addRow(row).commit()
  dictionary.commit()
  await workbook.commit()
}

/** exceljs writes strings as shared or inline text, never as formulas, but a later CSV of the sheet would run them. */
const xlsxCell = (value: Value) => (typeof value === 'string' ? safeText(value) : value)

export const dictionaryRows = (): string[][] => [
  ['column', 'unit', 'type', 'description'],
  ...columns().map((c) => [headerOf(c), c.unit ?? '', c.kind, c.description]),
]

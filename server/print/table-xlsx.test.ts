import Excel from 'exceljs'
import { expect, it } from 'vitest'
import type { Column } from '../../shared/layouts/column.ts'
import type { Line, Table } from './table.ts'
import { xlsxOf } from './table-xlsx.ts'

const column = (name: string, kind: Column['kind'], unit: string | null = null): Column => ({ name, unit, kind, description: '' })

async function* batches(...list: Line[][]) {
  yield* list
}

/** Read by the library that writes our forms, which did not write this. */
async function read(table: Table, sheetRows?: number): Promise<Excel.Worksheet[]> {
  const pieces: Buffer[] = []
  for await (const piece of xlsxOf([table], sheetRows)) pieces.push(piece)
  const workbook = new Excel.Workbook()
  await workbook.xlsx.load(Buffer.concat(pieces) as never)
  return workbook.worksheets
}

const valuesOf = (sheet: Excel.Worksheet) => (sheet.getColumn(1).values as unknown[]).slice(1)

it('every kind of value comes back as what it is', async () => {
  const columns = [
    column('n', 'number', 'L/ha'),
    column('t', 'text'),
    column('b', 'boolean'),
    column('d', 'date'),
    column('m', 'moment'),
    column('none', 'text'),
  ]
  const line = [-14.074074074074076, '<a> & "b"\u0001 ✓ ', false, '2024-02-29', '2026-10-14T09:30:00.000Z', null]
  const [sheet] = await read({ name: 'book', columns, lines: batches([line]) })
  expect(sheet?.name).toBe('book')
  expect((sheet!.getRow(1).values as unknown[]).slice(1)).toEqual(['n [L/ha]', 't', 'b', 'd', 'm', 'none'])
  const [n, t, b, d, m, none] = [1, 2, 3, 4, 5, 6].map((i) => sheet?.getRow(2).getCell(i).value)
  expect([n, t, b, none]).toEqual([line[0], '<a> & "b"\ufffd ✓ ', false, null])
  expect([d, m].map((at) => (at as Date).toISOString())).toEqual(['2024-02-29T00:00:00.000Z', '2026-10-14T09:30:00.000Z'])
})

it('what does not fit on a worksheet goes on on the next one', async () => {
  const sheets = await read({ name: 'book', columns: [column('n', 'integer')], lines: batches([[1], [2]], [[3], [4]], [[5]]) }, 4)
  expect(sheets.map((sheet) => sheet.name)).toEqual(['book', 'book 2'])
  expect(sheets.map(valuesOf)).toEqual([
    ['n', 1, 2],
    ['n', 3, 4, 5],
  ])
})

it('a table without lines has its heading', async () => {
  const [sheet] = await read({ name: 'book', columns: [column('n', 'integer')], lines: batches() })
  expect(valuesOf(sheet!)).toEqual(['n'])
})

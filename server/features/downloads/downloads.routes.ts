/** The data, to take away: wide and long, in three formats, and both together with their description. */

import { z } from 'zod'
import { valueColumns } from '../../../shared/layouts/value-columns.ts'
import { listValuesSchema, valueListSchema } from '../../../shared/schemas/book-value.ts'
import { listRecordsSchema } from '../../../shared/schemas/record.ts'
import type { RecordFilter } from '../../db/desk/record-rows.ts'
import { type Deps, type Route, route } from '../../http/route.ts'
import type { Table } from '../../print/table.ts'
import { csvOf } from '../../print/table-csv.ts'
import { parquetOf } from '../../print/table-parquet.ts'
import { xlsxOf } from '../../print/table-xlsx.ts'
import { visibleTo } from '../records/records.service.ts'
import { dataPackage } from './data-package.ts'
import { packageZip } from './package-zip.ts'
import { sendDownload } from './send-download.ts'
import { dictionaryTable, recordColumns, recordTable, valueTable } from './tables.ts'
import { listValues } from './values.service.ts'

const KEEPERS = ['clerk', 'analyst', 'admin'] as const
const CSV = 'text/csv; charset=utf-8'
const FORMATS = {
  csv: { type: CSV, write: (table: Table) => csvOf(table) },
  xlsx: {
    type: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
    write: (table: Table) => xlsxOf([table, dictionaryTable('Dictionary', table.columns)]),
  },
  parquet: { type: 'application/vnd.apache.parquet', write: (table: Table) => parquetOf(table) },
} as const
type Format = keyof typeof FORMATS

function tableRoute(path: string, format: Format, summary: string, make: (deps: Deps, filter: RecordFilter) => Table): Route {
  return route({
    method: 'get',
    path: `${path}.${format}`,
    summary: `${summary}, as ${format === 'parquet' ? 'Parquet' : format.toUpperCase()}`,
    access: KEEPERS,
    scope: 'book',
    query: listRecordsSchema,
    handle: ({ deps, actor, query, res }) => {
      const table = make(deps, visibleTo(actor, query))
      return sendDownload(res, {
        type: FORMATS[format].type,
        name: `${table.name}.${format}`,
        pieces: FORMATS[format].write(table),
      })
    },
  })
}

const formats = Object.keys(FORMATS) as Format[]

export const downloadRoutes: Route[] = [
  ...formats.map((format) => tableRoute('/records', format, 'The trial book, one line a record', recordTable)),
  ...formats.map((format) => tableRoute('/values', format, 'The trial book, one line a value', valueTable)),
  route({
    method: 'get',
    path: '/values',
    summary: 'Readings and figures with unit, uncertainty, origin and ink: whole records, newest first',
    access: KEEPERS,
    scope: 'book',
    query: listRecordsSchema.extend(listValuesSchema.shape),
    response: valueListSchema,
    handle: ({ deps, actor, query: { records, ...filter } }) => listValues(deps, visibleTo(actor, filter), records),
  }),
  route({
    method: 'get',
    path: '/records/dictionary.csv',
    summary: 'What every column of the wide download means',
    access: KEEPERS,
    scope: 'book',
    handle: ({ res }) =>
      sendDownload(res, { type: CSV, name: 'trial-book-dictionary.csv', pieces: csvOf(dictionaryTable('', recordColumns())) }),
  }),
  route({
    method: 'get',
    path: '/values/dictionary.csv',
    summary: 'What every column of the long download means',
    access: KEEPERS,
    scope: 'book',
    handle: ({ res }) =>
      sendDownload(res, {
        type: CSV,
        name: 'trial-book-values-dictionary.csv',
        pieces: csvOf(dictionaryTable('', valueColumns())),
      }),
  }),
  route({
    method: 'get',
    path: '/datapackage.json',
    summary: 'The description of the data (Data Package 2.0); its paths are records.csv and values.csv beside it',
    access: KEEPERS,
    scope: 'book',
    response: z.record(z.string(), z.unknown()),
    handle: ({ deps }) => ({ ...dataPackage(deps.settings.publicUrl) }),
  }),
  route({
    method: 'get',
    path: '/datapackage.zip',
    summary: 'Description and both tables in one file (Data Package 2.0)',
    access: KEEPERS,
    scope: 'book',
    query: listRecordsSchema,
    handle: ({ deps, actor, query, res }) =>
      sendDownload(res, { type: 'application/zip', name: 'trial-book.zip', pieces: packageZip(deps, visibleTo(actor, query)) }),
  }),
]

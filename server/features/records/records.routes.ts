import { z } from 'zod'
import { challengeSchema, listRecordsSchema, recordListSchema, recordSchema } from '../../../shared/schemas/record.ts'
import { type Route, route } from '../../http/route.ts'
import { csvLine } from '../../print/csv-text.ts'
import { dictionaryRows, sendCsv, sendXlsx } from './book-export.ts'
import { challenge, getRecord, listRecords, visibleTo } from './records.service.ts'

const READERS = ['demonstrator', 'clerk', 'analyst', 'admin'] as const
const KEEPERS = ['clerk', 'analyst', 'admin'] as const
const params = z.object({ number: z.coerce.number().int().positive() })

export const recordRoutes: Route[] = [
  route({
    method: 'get',
    path: '/records',
    summary: 'The trial book, filtered; a demonstrator sees their own',
    access: READERS,
    query: listRecordsSchema,
    response: recordListSchema,
    handle: ({ deps, actor, query }) => listRecords(deps, actor, query),
  }),
  route({
    method: 'get',
    path: '/records.csv',
    summary: 'The trial book as CSV (RFC 4180)',
    access: KEEPERS,
    query: listRecordsSchema,
    handle: ({ deps, actor, query, res }) => sendCsv(deps.source.manager, visibleTo(actor, query), res),
  }),
  route({
    method: 'get',
    path: '/records.xlsx',
    summary: 'The trial book as a workbook, with its dictionary',
    access: KEEPERS,
    query: listRecordsSchema,
    handle: ({ deps, actor, query, res }) => sendXlsx(deps.source.manager, visibleTo(actor, query), res),
  }),
  route({
    method: 'get',
    path: '/records/dictionary.csv',
    summary: 'What every column of the downloads means',
    access: KEEPERS,
    handle: ({ res }) => {
      res.set({
        'Content-Type': 'text/csv; charset=utf-8',
        'Content-Disposition': 'attachment; filename="trial-book-dictionary.csv"',
      })
      res.send(dictionaryRows().map(csvLine).join(''))
    },
  }),
  route({
    method: 'get',
    path: '/records/:number',
    summary: 'A record with readings, results and history',
    access: READERS,
    params,
    query: z.object({ version: z.coerce.number().int().positive().optional() }),
    response: recordSchema,
    handle: ({ deps, actor, params, query }) => getRecord(deps, actor, params.number, query.version),
  }),
  route({
    method: 'post',
    path: '/records/:number/challenge',
    summary: 'Challenge a record: its sheet goes back to the desk',
    access: ['analyst', 'admin'],
    params,
    body: challengeSchema,
    response: recordSchema,
    handle: ({ deps, actor, params, body }) => challenge(deps, actor, params.number, body.reason),
  }),
]

import { z } from 'zod'
import { challengeSchema, listRecordsSchema, recordListSchema, recordSchema } from '../../../shared/schemas/record.ts'
import { type Route, route } from '../../http/route.ts'
import { challenge, getRecord, listRecords } from './records.service.ts'

const READERS = ['demonstrator', 'clerk', 'analyst', 'admin'] as const
const params = z.object({ number: z.coerce.number().int().positive() })

export const recordRoutes: Route[] = [
  route({
    method: 'get',
    path: '/records',
    summary: 'The trial book, filtered; a demonstrator sees their own',
    access: READERS,
    scope: 'book',
    query: listRecordsSchema,
    response: recordListSchema,
    handle: ({ deps, actor, query }) => listRecords(deps, actor, query),
  }),
  route({
    method: 'get',
    path: '/records/:number',
    summary: 'A record with readings, results and history',
    access: READERS,
    scope: 'book',
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

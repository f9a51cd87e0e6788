import {
  bookComparisonSchema,
  comparisonQuerySchema,
  excludeSchema,
  exclusionLogSchema,
} from '../../../shared/schemas/book-comparison.ts'
import { type Route, route } from '../../http/route.ts'
import { compareInBook } from './comparisons.service.ts'
import { exclusionLog, leaveOut, takeBack } from './exclusions.service.ts'

const COMPARERS = ['analyst', 'admin'] as const

export const comparisonRoutes: Route[] = [
  route({
    method: 'get',
    path: '/comparisons',
    summary: 'Runs of the trial book compared: the design they support, the analysis, and what may be said',
    access: COMPARERS,
    query: comparisonQuerySchema,
    response: bookComparisonSchema,
    handle: ({ deps, query }) => compareInBook(deps, query),
  }),
  route({
    method: 'get',
    path: '/comparisons/exclusions',
    summary: 'The log of runs left out of comparisons, newest first',
    access: COMPARERS,
    response: exclusionLogSchema,
    handle: ({ deps }) => exclusionLog(deps),
  }),
  route({
    method: 'post',
    path: '/comparisons/exclusions',
    summary: 'Leave a run out of comparisons, with the reason',
    access: COMPARERS,
    body: excludeSchema,
    response: exclusionLogSchema,
    handle: ({ deps, actor, body }) => leaveOut(deps, actor, body),
  }),
  route({
    method: 'post',
    path: '/comparisons/exclusions/take-back',
    summary: 'Take a run back into comparisons, with the reason',
    access: COMPARERS,
    body: excludeSchema,
    response: exclusionLogSchema,
    handle: ({ deps, actor, body }) => takeBack(deps, actor, body),
  }),
]

import { changeListSchema, listChangesSchema } from '../../../shared/schemas/change.ts'
import { type Route, route } from '../../http/route.ts'
import { listChanges } from './changes.service.ts'

export const changeRoutes: Route[] = [
  route({
    method: 'get',
    path: '/changes',
    summary: 'What was entered, changed and withdrawn after a position, in order: enough to keep a copy of the book',
    access: ['clerk', 'analyst', 'admin'],
    scope: 'changes',
    query: listChangesSchema,
    response: changeListSchema,
    handle: ({ deps, query }) => listChanges(deps, query),
  }),
]

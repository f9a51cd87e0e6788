import { z } from 'zod'
import { trailListSchema } from '../../../shared/schemas/trail.ts'
import { route } from '../../http/route.ts'
import { readTrail } from './trail.service.ts'

export const trailRoutes = [
  route({
    method: 'get',
    path: '/trail',
    summary: 'The audit trail, newest first',
    access: ['admin'],
    query: z.object({ after: z.coerce.number().int().positive().optional() }),
    response: trailListSchema,
    handle: ({ deps, query }) => readTrail(deps.source.manager, query.after ?? null),
  }),
]

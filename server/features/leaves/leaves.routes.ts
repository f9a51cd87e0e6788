import { z } from 'zod'
import { leafStatusSchema } from '../../../shared/schemas/leaf.ts'
import { type Route, route } from '../../http/route.ts'
import { leafPdf, leafStatus, sendLeaf } from './leaves.service.ts'

const READERS = ['demonstrator', 'clerk', 'analyst', 'admin'] as const
const params = z.object({ number: z.coerce.number().int().positive() })

export const leafRoutes: Route[] = [
  route({
    method: 'get',
    path: '/records/:number/leaf.pdf',
    summary: 'The page the farmer takes home; an earlier version says that it is superseded',
    access: READERS,
    params,
    query: z.object({ version: z.coerce.number().int().positive().optional() }),
    handle: async ({ deps, actor, params, query, res }) => {
      const pdf = await leafPdf(deps, actor, params.number, query.version)
      res.type('application/pdf').attachment(`leaf-${params.number}.pdf`).send(pdf)
    },
  }),
  route({
    method: 'get',
    path: '/records/:number/leaf',
    summary: 'Whether the leaf may go out by mail, and when it did',
    access: READERS,
    params,
    response: leafStatusSchema,
    handle: ({ deps, actor, params }) => leafStatus(deps, actor, params.number),
  }),
  route({
    method: 'post',
    path: '/records/:number/leaf',
    summary: 'Send the leaf to the farmer by mail: once a version, and only with consent',
    access: ['demonstrator', 'admin'],
    params,
    response: leafStatusSchema,
    status: 202,
    handle: ({ deps, actor, params }) => sendLeaf(deps, actor, params.number),
  }),
]

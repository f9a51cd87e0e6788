import { z } from 'zod'
import { demonstrationRowSchema, demonstrationSchema, saveDemonstrationSchema } from '../../../shared/schemas/demonstration.ts'
import { idSchema } from '../../../shared/schemas/user.ts'
import { listDemonstrations } from '../../db/repositories/demonstration.ts'
import { type Route, route } from '../../http/route.ts'
import { sendFile } from '../../http/send-file.ts'
import { withdrawConsent } from './consent.service.ts'
import { planDemonstration, replanDemonstration } from './demonstrations.service.ts'
import { getDemonstration } from './get-demonstration.ts'
import { printPlanned } from './print-sheets.service.ts'

const PLANNERS = ['demonstrator', 'admin'] as const
const params = z.object({ id: idSchema })
const filter = z.object({
  from: z.iso.date().optional(),
  to: z.iso.date().optional(),
  after: z
    .string()
    .regex(/^\d{4}-\d{2}-\d{2}\|[0-9a-f-]{36}$/, 'the date and id of the last row seen')
    .optional(),
})

export const demonstrationRoutes: Route[] = [
  route({
    method: 'get',
    path: '/demonstrations',
    summary: 'Demonstrations, newest first; a demonstrator sees their own',
    access: 'signed in',
    query: filter,
    response: z.array(demonstrationRowSchema),
    handle: ({ deps, actor, query: { from = null, to = null, after = null } }) =>
      listDemonstrations(deps.source.manager, {
        from,
        to,
        after,
        demonstratorId: actor.role === 'demonstrator' ? actor.id : null,
      }),
  }),
  route({
    method: 'post',
    path: '/demonstrations',
    summary: 'Plan a demonstration with its trials and runs',
    access: PLANNERS,
    body: saveDemonstrationSchema,
    response: demonstrationSchema,
    status: 201,
    handle: ({ deps, actor, body }) => planDemonstration(deps, actor, body),
  }),
  route({
    method: 'get',
    path: '/demonstrations/:id',
    summary: 'A demonstration with its trials, runs and sheets',
    access: 'signed in',
    params,
    response: demonstrationSchema,
    handle: ({ deps, actor, params }) => getDemonstration(deps.source.manager, actor, params.id),
  }),
  route({
    method: 'put',
    path: '/demonstrations/:id',
    summary: 'Change the plan of a demonstration',
    access: PLANNERS,
    params,
    body: saveDemonstrationSchema.extend({ version: z.number().int() }),
    response: demonstrationSchema,
    handle: ({ deps, actor, params, body }) => replanDemonstration(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/demonstrations/:id/withdraw-consent',
    summary: 'Erase the farmer, and blank their place in every stored picture',
    access: PLANNERS,
    params,
    body: z.object({ reason: z.string().trim().min(3).max(500) }),
    response: demonstrationSchema,
    handle: ({ deps, actor, params, body }) => withdrawConsent(deps, actor, params.id, body.reason),
  }),
  route({
    method: 'get',
    path: '/demonstrations/:id/sheets.pdf',
    summary: 'All its sheets, to print',
    access: ['demonstrator', 'clerk', 'admin'],
    params,
    handle: async ({ deps, actor, params, res }) => {
      const bytes = await printPlanned(deps, actor, { demonstrationId: params.id })
      sendFile(res, { type: 'application/pdf', name: 'sheets.pdf', bytes, show: true })
    },
  }),
  route({
    method: 'get',
    path: '/sheets/:id/sheet.pdf',
    summary: 'One sheet, to print',
    access: ['demonstrator', 'clerk', 'admin'],
    params,
    handle: async ({ deps, actor, params, res }) => {
      const bytes = await printPlanned(deps, actor, { sheetId: params.id })
      sendFile(res, { type: 'application/pdf', name: 'sheet.pdf', bytes, show: true })
    },
  }),
]

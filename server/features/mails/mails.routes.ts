import { z } from 'zod'
import { mailSchema } from '../../../shared/schemas/mail.ts'
import { listMails } from '../../db/repositories/mail.ts'
import { route } from '../../http/route.ts'

export const mailRoutes = [
  route({
    method: 'get',
    path: '/mails',
    summary: 'The outbox: mails sent and waiting, newest first',
    access: ['admin'],
    response: z.array(mailSchema),
    handle: ({ deps }) => listMails(deps.source.manager),
  }),
]

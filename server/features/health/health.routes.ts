import { z } from 'zod'
import { route } from '../../http/route.ts'

export const healthRoutes = [
  route({
    method: 'get',
    path: '/health',
    summary: 'Whether the server and its database answer',
    access: 'anyone',
    response: z.object({ state: z.literal('ready') }),
    handle: async ({ deps }) => {
      await deps.source.query('SELECT 1')
      return { state: 'ready' as const }
    },
  }),
]

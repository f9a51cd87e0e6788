import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import { mailSchema } from '../../../shared/schemas/mail.ts'
import { api } from '../../lib/api.ts'

export const mailQueries = {
  list: () =>
    queryOptions({
      queryKey: ['mails'],
      queryFn: ({ signal }) => api.get('/mails', z.array(mailSchema), signal),
      refetchInterval: 10_000,
    }),
}

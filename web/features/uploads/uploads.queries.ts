import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import { type Upload, uploadSchema } from '../../../shared/schemas/upload.ts'
import { api } from '../../lib/api.ts'

export const uploadListSchema = z.object({ uploads: z.array(uploadSchema) })

/** Progress is seen at least every two seconds; nothing is asked for once all is read. */
const WATCH_MS = 1_500

const pending = (upload: Upload): boolean => upload.state === 'arrived' || upload.state === 'being read'

export const uploadQueries = {
  all: () => ['uploads'] as const,
  /** Newest first: a demonstrator's own, everybody's for the office. */
  list: () =>
    queryOptions({
      queryKey: [...uploadQueries.all(), 'list'],
      queryFn: async ({ signal }) => (await api.get('/uploads', uploadListSchema, signal)).uploads,
      refetchInterval: ({ state }) => (state.data?.some(pending) ? WATCH_MS : false),
    }),
}

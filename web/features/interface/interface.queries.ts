import { queryOptions } from '@tanstack/react-query'
import { api } from '../../lib/api.ts'
import { documentSchema } from './interface-model.ts'

export const interfaceQueries = {
  document: () =>
    queryOptions({
      queryKey: ['openapi'] as const,
      queryFn: ({ signal }) => api.get('/openapi.json', documentSchema, signal),
      // It changes with the server only.
      staleTime: Number.POSITIVE_INFINITY,
    }),
}

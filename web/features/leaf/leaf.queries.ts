import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { leafStatusSchema } from '../../../shared/schemas/leaf.ts'
import { api, withQuery } from '../../lib/api.ts'

export const leafQueries = {
  status: (number: number) =>
    queryOptions({
      queryKey: ['leaf', number] as const,
      queryFn: ({ signal }) => api.get(`/records/${number}/leaf`, leafStatusSchema, signal),
    }),
}

export const leafPath = (number: number, version: number) => withQuery(`/api/records/${number}/leaf.pdf`, { version })

export function useSendLeaf(number: number) {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: () => api.post(`/records/${number}/leaf`, {}, leafStatusSchema),
    onSuccess: (status) => cache.setQueryData(leafQueries.status(number).queryKey, status),
  })
}

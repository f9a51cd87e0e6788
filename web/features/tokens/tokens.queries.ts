import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type CreateToken, createdTokenSchema, tokenSchema } from '../../../shared/schemas/token.ts'
import { api } from '../../lib/api.ts'

export const tokenQueries = {
  all: () => ['tokens'] as const,
  list: () =>
    queryOptions({ queryKey: tokenQueries.all(), queryFn: ({ signal }) => api.get('/tokens', z.array(tokenSchema), signal) }),
}

export function useMakeToken() {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: (input: CreateToken) => api.post('/tokens', input, createdTokenSchema),
    onSuccess: () => cache.invalidateQueries({ queryKey: tokenQueries.all() }),
  })
}

export function useRevokeToken() {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: (id: string) => api.post(`/tokens/${id}/revoke`, {}, tokenSchema),
    onSuccess: () => cache.invalidateQueries({ queryKey: tokenQueries.all() }),
  })
}

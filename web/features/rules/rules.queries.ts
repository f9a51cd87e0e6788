import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { rulePageSchema, type SaveLimits } from '../../../shared/schemas/rules.ts'
import { api } from '../../lib/api.ts'

export const ruleQueries = {
  page: () => queryOptions({ queryKey: ['rules'], queryFn: ({ signal }) => api.get('/rules', rulePageSchema, signal) }),
}

/** Saves limits as a new version. Doubts of sheets follow from them, so everything read before is asked again. */
export function useSetLimits() {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: (input: SaveLimits) => api.post('/rules/limits', input, rulePageSchema),
    onSuccess: () => cache.invalidateQueries(),
  })
}

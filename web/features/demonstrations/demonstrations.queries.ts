import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { demonstrationRowSchema, demonstrationSchema, type SaveDemonstration } from '../../../shared/schemas/demonstration.ts'
import { userSchema } from '../../../shared/schemas/user.ts'
import { api, withQuery } from '../../lib/api.ts'

const demonstratorSchema = userSchema.pick({ id: true, number: true, name: true })

export const demonstrationQueries = {
  all: () => ['demonstrations'] as const,
  /** The newest 200; a demonstrator gets their own. */
  list: () =>
    queryOptions({
      queryKey: [...demonstrationQueries.all(), 'list'],
      queryFn: ({ signal }) => api.get(withQuery('/demonstrations', {}), z.array(demonstrationRowSchema), signal),
    }),
  detail: (id: string) =>
    queryOptions({
      queryKey: [...demonstrationQueries.all(), 'detail', id],
      queryFn: ({ signal }) => api.get(`/demonstrations/${id}`, demonstrationSchema, signal),
    }),
  demonstrators: () =>
    queryOptions({
      queryKey: [...demonstrationQueries.all(), 'demonstrators'],
      queryFn: ({ signal }) => api.get('/demonstrators', z.array(demonstratorSchema), signal),
    }),
}

/** What was planned before, when a plan is changed: a stale version is refused. */
export interface PlanAt {
  id: string
  version: number
}

function useAct<Input>(act: (input: Input) => Promise<z.infer<typeof demonstrationSchema>>) {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: act,
    onSuccess: async (saved) => {
      cache.setQueryData(demonstrationQueries.detail(saved.id).queryKey, saved)
      await cache.invalidateQueries({ queryKey: demonstrationQueries.all() })
    },
  })
}

/** Plans a new day, or changes the one given. */
export const useSavePlan = (at: PlanAt | null) =>
  useAct((plan: SaveDemonstration) =>
    at
      ? api.put(`/demonstrations/${at.id}`, { ...plan, version: at.version }, demonstrationSchema)
      : api.post('/demonstrations', plan, demonstrationSchema),
  )

export const useWithdrawConsent = (id: string) =>
  useAct((reason: string) => api.post(`/demonstrations/${id}/withdraw-consent`, { reason }, demonstrationSchema))

import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type InviteUser, type UpdateUser, userSchema } from '../../../shared/schemas/user.ts'
import { api } from '../../lib/api.ts'

export const peopleQueries = {
  all: () => ['people'] as const,
  list: () =>
    queryOptions({ queryKey: peopleQueries.all(), queryFn: ({ signal }) => api.get('/users', z.array(userSchema), signal) }),
}

function useAct<Input>(act: (input: Input) => Promise<unknown>) {
  const cache = useQueryClient()
  return useMutation({ mutationFn: act, onSuccess: () => cache.invalidateQueries({ queryKey: peopleQueries.all() }) })
}

export const useInvite = () => useAct((input: InviteUser) => api.post('/users', input, userSchema))
export const useInviteAgain = () => useAct((id: string) => api.post(`/users/${id}/invite`, {}, userSchema))
export const useUpdatePerson = () =>
  useAct(({ id, change }: { id: string; change: UpdateUser }) => api.patch(`/users/${id}`, change, userSchema))

import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { REGISTERS, type RegisterName, type RegisterRows } from '../../../shared/schemas/register.ts'
import { api } from '../../lib/api.ts'

export const registerQueries = {
  all: () => ['registers'] as const,
  rows: <N extends RegisterName>(name: N) =>
    queryOptions({
      queryKey: [...registerQueries.all(), name],
      queryFn: async ({ signal }): Promise<RegisterRows[N][]> =>
        (await api.get(`/registers/${name}`, z.array(REGISTERS[name].row), signal)) as RegisterRows[N][],
    }),
}

interface Save {
  id: string | null
  values: Record<string, unknown>
}

/** Adds a row, or changes the one named on the version it was seen in. */
export function useSaveRow(name: RegisterName) {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: ({ id, values }: Save) =>
      id ? api.put(`/registers/${name}/${id}`, values) : api.post(`/registers/${name}`, values),
    onSuccess: () => cache.invalidateQueries({ queryKey: registerQueries.all() }),
  })
}

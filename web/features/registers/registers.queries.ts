import { useMutation, useQueryClient } from '@tanstack/react-query'
import type { RegisterName } from '../../../shared/schemas/register.ts'
import { api } from '../../lib/api.ts'
import { registerQueries } from '../../lib/register-rows.ts'

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

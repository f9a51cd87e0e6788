import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { landUnitSchema, type SaveLandUnit } from '../../../shared/schemas/land-unit.ts'
import { api } from '../../lib/api.ts'

const KEY = ['land-units']

export const landUnitQueries = {
  rows: () => queryOptions({ queryKey: KEY, queryFn: ({ signal }) => api.get('/land-units', z.array(landUnitSchema), signal) }),
}

export function useConfirmLandUnit() {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: (unit: SaveLandUnit) => api.post('/land-units', unit, landUnitSchema),
    onSuccess: () => cache.invalidateQueries({ queryKey: KEY }),
  })
}

export function useWithdrawLandUnit() {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: (id: string) => api.delete(`/land-units/${id}`),
    onSuccess: () => cache.invalidateQueries({ queryKey: KEY }),
  })
}

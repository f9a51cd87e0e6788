import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import {
  type EnterSheet,
  enteredSchema,
  type PlaceSheet,
  type SendBack,
  type SetAside,
  type Sheet,
  sheetListSchema,
  sheetSchema,
} from '../../../shared/schemas/sheet.ts'
import { api, withQuery } from '../../lib/api.ts'
import type { SettleBody } from './model/desk-op.ts'

/** The desk shows its own age; another clerk's name is seen within seconds. */
const LIST_AGAIN_MS = 15_000

export const deskQueries = {
  all: () => ['sheets'] as const,
  /** Everything a clerk has to do. */
  list: () =>
    queryOptions({
      queryKey: [...deskQueries.all(), 'desk'],
      queryFn: ({ signal }) => api.get(withQuery('/sheets', { desk: true }), sheetListSchema, signal),
      refetchInterval: LIST_AGAIN_MS,
    }),
  detail: (id: string) =>
    queryOptions({
      queryKey: [...deskQueries.all(), 'detail', id],
      queryFn: ({ signal }) => api.get(`/sheets/${id}`, sheetSchema, signal),
      // Being read again after its corners were set by hand.
      refetchInterval: ({ state }) => (state.data?.state === 'being read' ? 1_500 : false),
    }),
}

/** One settlement, on the version it was made on. */
export const postSettlement = (id: string, body: SettleBody): Promise<Sheet> =>
  api.post(`/sheets/${id}/${body.path}`, body.json, sheetSchema)

export const takeInHand = (id: string): Promise<Sheet> => api.post(`/sheets/${id}/take`, {}, sheetSchema)
export const letGo = (id: string): Promise<void> => api.delete(`/sheets/${id}/take`)

/** An act that ends the sheet's stay at the desk, or changes what it is. */
function useAct<Input, Answer>(act: (input: Input) => Promise<Answer>) {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: act,
    // Not waited for: once this sheet is looked up again its desk is gone, and with it whoever wants to go on from here.
    onSuccess: () => void cache.invalidateQueries({ queryKey: deskQueries.all() }),
  })
}

export const useSendBack = (id: string) => useAct((input: SendBack) => api.post(`/sheets/${id}/send-back`, input, sheetSchema))
export const useSetAside = (id: string) => useAct((input: SetAside) => api.post(`/sheets/${id}/set-aside`, input, sheetSchema))
export const useTakeUp = (id: string) =>
  useAct((input: { version: number }) => api.post(`/sheets/${id}/take-up`, input, sheetSchema))
export const usePlace = (id: string) => useAct((input: PlaceSheet) => api.post(`/sheets/${id}/place`, input, sheetSchema))
export const useEnter = (id: string) => useAct((input: EnterSheet) => api.post(`/sheets/${id}/enter`, input, enteredSchema))

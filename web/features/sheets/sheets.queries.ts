import { queryOptions } from '@tanstack/react-query'
import { sheetListSchema, sheetSchema } from '../../../shared/schemas/sheet.ts'
import { api } from '../../lib/api.ts'

export const mySheetQueries = {
  all: () => ['sheets'] as const,
  /** A demonstrator's own sheets, newest first. */
  list: () =>
    queryOptions({
      queryKey: [...mySheetQueries.all(), 'mine'],
      queryFn: ({ signal }) => api.get('/sheets', sheetListSchema, signal),
    }),
  detail: (id: string) =>
    queryOptions({
      queryKey: [...mySheetQueries.all(), 'mine', id],
      queryFn: ({ signal }) => api.get(`/sheets/${id}`, sheetSchema, signal),
    }),
}

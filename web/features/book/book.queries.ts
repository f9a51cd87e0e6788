import { keepPreviousData, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { type ListRecords, recordListSchema, recordSchema } from '../../../shared/schemas/record.ts'
import { api, withQuery } from '../../lib/api.ts'

/** What stands in the address: every filter as text. */
export type BookFilters = Record<Exclude<keyof ListRecords, 'after'>, string>
export const FILTERS = ['find', 'tractor', 'implement', 'place', 'operation', 'soil', 'from', 'to'] as const

export const filtersOf = (search: URLSearchParams): BookFilters =>
  Object.fromEntries(FILTERS.map((name) => [name, search.get(name) ?? ''])) as BookFilters

export const bookQueries = {
  all: () => ['records'] as const,
  list: (filters: BookFilters, after: string) =>
    queryOptions({
      queryKey: [...bookQueries.all(), 'list', filters, after],
      queryFn: ({ signal }) => api.get(withQuery('/records', { ...filters, after }), recordListSchema, signal),
      placeholderData: keepPreviousData,
    }),
  detail: (number: number, version: number | undefined) =>
    queryOptions({
      queryKey: [...bookQueries.all(), 'detail', number, version ?? 'newest'],
      queryFn: ({ signal }) => api.get(withQuery(`/records/${number}`, { version }), recordSchema, signal),
    }),
}

export const FORMATS = ['csv', 'xlsx', 'parquet'] as const
/** Downloads take the same filters as the page. `records`: one line a record; `values`: one line a reading or figure. */
export const downloadPath = (
  file: `${'records' | 'values'}.${(typeof FORMATS)[number]}` | 'datapackage.zip',
  filters: BookFilters,
) => withQuery(`/api/${file}`, filters)

export function useChallenge(number: number) {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: (reason: string) => api.post(`/records/${number}/challenge`, { reason }, recordSchema),
    onSuccess: () => cache.invalidateQueries({ queryKey: bookQueries.all() }),
  })
}

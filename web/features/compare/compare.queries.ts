import { keepPreviousData, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import {
  bookComparisonSchema,
  COMPARED_FIGURES,
  COMPARED_THINGS,
  COMPARISON_FILTERS,
  type ComparedFigure,
  type ComparedThing,
  type ComparisonFilter,
  type Exclude,
  exclusionLogSchema,
  FILTER_SEPARATOR,
} from '../../../shared/schemas/book-comparison.ts'
import { api, withQuery } from '../../lib/api.ts'

/** What stands in the address. */
export interface Choices {
  figure: ComparedFigure
  of: ComparedThing
  gap: string
  filters: Record<ComparisonFilter, readonly string[]>
}

const oneOf = <T extends string>(all: readonly T[], text: string | null): T => all.find((one) => one === text) ?? all[0]!

const listed = (text: string | null): string[] => (text ?? '').split(FILTER_SEPARATOR).filter((part) => part !== '')

export const choicesOf = (search: URLSearchParams): Choices => ({
  figure: oneOf(COMPARED_FIGURES, search.get('figure')),
  of: oneOf(COMPARED_THINGS, search.get('of')),
  gap: Number(search.get('gap')) > 0 ? search.get('gap')! : '',
  filters: Object.fromEntries(
    COMPARISON_FILTERS.map((name): [string, readonly string[]] => [name, listed(search.get(name))]),
  ) as Choices['filters'],
})

const queryOf = ({ figure, of, gap, filters }: Choices): Record<string, string> => ({
  figure,
  of,
  gap,
  ...Object.fromEntries(COMPARISON_FILTERS.map((name) => [name, filters[name].join(FILTER_SEPARATOR)])),
})

export const compareQueries = {
  all: () => ['comparisons'] as const,
  of: (choices: Choices) =>
    queryOptions({
      queryKey: [...compareQueries.all(), queryOf(choices)],
      queryFn: ({ signal }) => api.get(withQuery('/comparisons', queryOf(choices)), bookComparisonSchema, signal),
      placeholderData: keepPreviousData,
    }),
  log: () =>
    queryOptions({
      queryKey: [...compareQueries.all(), 'exclusions'],
      queryFn: ({ signal }) => api.get('/comparisons/exclusions', exclusionLogSchema, signal),
    }),
}

/** Leaves a run out of comparisons, or takes it back; the figures follow. */
export function useExclusion() {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: ({ act, ...exclude }: Exclude & { act: 'leave out' | 'take back' }) =>
      api.post(`/comparisons/exclusions${act === 'take back' ? '/take-back' : ''}`, exclude, exclusionLogSchema),
    onSuccess: () => cache.invalidateQueries({ queryKey: compareQueries.all() }),
  })
}

import { infiniteQueryOptions } from '@tanstack/react-query'
import { trailListSchema } from '../../../shared/schemas/trail.ts'
import { api, withQuery } from '../../lib/api.ts'

export const trailQueries = {
  lines: () =>
    infiniteQueryOptions({
      queryKey: ['trail'],
      queryFn: ({ pageParam, signal }) => api.get(withQuery('/trail', { after: pageParam }), trailListSchema, signal),
      initialPageParam: null as number | null,
      getNextPageParam: (page) => page.next,
    }),
}

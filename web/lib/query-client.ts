import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query'
import { ApiError } from './api-error.ts'

const FEW = 2
/** What may be over in a second. */
const PASSING = new Set(['line_down', 'unavailable'])

/**
 * One cache for what the server said. A refusal (4xx) is an answer and is not asked again; a silent line is.
 * `signedOut` is called when any request finds the session gone.
 */
export function createQueryClient(signedOut: () => void): QueryClient {
  const onError = (error: unknown) => {
    if (error instanceof ApiError && error.code === 'not_signed_in') signedOut()
  }
  return new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: {
        staleTime: 5_000,
        retry: (count, error) => count < FEW && error instanceof ApiError && PASSING.has(error.code),
        // The offline note stands in the head; a query that waits in silence would look like an empty page.
        networkMode: 'always',
      },
      mutations: { networkMode: 'always' },
    },
  })
}

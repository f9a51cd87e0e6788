import { type QueryClient, QueryClientProvider } from '@tanstack/react-query'
import type { ReactNode } from 'react'
import { sessionQueries } from '../features/session/session.queries.ts'
import { createQueryClient } from '../lib/query-client.ts'

/** The cache of the whole app. A request that finds the session gone signs out everywhere: the shell then asks for a sign-in. */
export function createAppQueryClient(): QueryClient {
  const client: QueryClient = createQueryClient(() => client.setQueryData(sessionQueries.me().queryKey, null))
  return client
}

export function Providers({ client, children }: { client: QueryClient; children: ReactNode }) {
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>
}

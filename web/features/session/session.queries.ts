import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { type Session, type SignIn, sessionSchema } from '../../../shared/schemas/user.ts'
import { api } from '../../lib/api.ts'
import { ApiError, isLineDown } from '../../lib/api-error.ts'

export const linkSchema = z.object({
  kind: z.enum(['invitation', 'reset', 'first admin']),
  name: z.string().nullable(),
  email: z.string().nullable(),
})
export type OneTimeLink = z.infer<typeof linkSchema>

/** Who was signed in last, so that a phone without a line opens for them; the server decides again when the line is back. */
const LAST = 'sheafbook.last-session'

function keepSession(session: Session | null): Session | null {
  if (session) localStorage.setItem(LAST, JSON.stringify(session))
  else localStorage.removeItem(LAST)
  return session
}

async function fetchMe(): Promise<Session | null> {
  try {
    return keepSession(await api.get('/session', sessionSchema))
  } catch (error) {
    if (error instanceof ApiError && error.code === 'not_signed_in') return keepSession(null)
    const last = sessionSchema.safeParse(JSON.parse(localStorage.getItem(LAST) ?? 'null'))
    if (isLineDown(error) && last.success) return last.data
    throw error
  }
}

export const sessionQueries = {
  all: () => ['session'] as const,
  /** null: nobody is signed in. */
  me: () => queryOptions({ queryKey: [...sessionQueries.all(), 'me'], queryFn: fetchMe, staleTime: 60_000 }),
  link: (token: string) =>
    queryOptions({
      queryKey: [...sessionQueries.all(), 'link', token],
      queryFn: () => api.get(`/links/${encodeURIComponent(token)}`, linkSchema),
      retry: false,
    }),
}

/** Whoever signs in starts from an empty cache: what another person saw stays theirs. */
function useSessionStart<Input>(path: string) {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: (input: Input) => api.post(path, input, sessionSchema),
    onSuccess: (session) => {
      cache.clear()
      cache.setQueryData(sessionQueries.me().queryKey, keepSession(session))
    },
  })
}

export const useSignIn = () => useSessionStart<SignIn>('/session')
export const useSetPassword = () => useSessionStart<{ token: string; password: string }>('/password/set')
export const useFirstAdmin = () =>
  useSessionStart<{ token: string; password: string; name: string; email: string }>('/first-admin')

export const useRequestLink = () =>
  useMutation({ mutationFn: (input: { email: string }) => api.post('/password/request', input) })

export function useSignOut() {
  const cache = useQueryClient()
  return useMutation({
    mutationFn: () => api.delete('/session'),
    onSuccess: () => {
      cache.clear()
      cache.setQueryData(sessionQueries.me().queryKey, keepSession(null))
    },
  })
}

/**
 * The server as the web app meets it: answers over fetch, each parsed with the shared schema before it is given, so that a
 * test cannot invent a shape. It keeps no rules of its own.
 */
import { vi } from 'vitest'
import type { z } from 'zod'

export interface Asked {
  method: string
  path: string
  /** What stands after the question mark. */
  query: URLSearchParams
  body: unknown
}

type Answer = { status: number; body: unknown }
type Handler = (asked: Asked) => Answer | undefined

export const answer = <S extends z.ZodType>(schema: S, body: z.input<S>, status = 200): Answer => ({
  status,
  body: schema.parse(body),
})
export const nothing: Answer = { status: 204, body: null }
export const refusal = (
  status: number,
  code: string,
  message: string,
  issues: Array<{ path: string; message: string }> = [],
): Answer => ({
  status,
  body: { error: { code, message, issues, requestId: 'test' } },
})

export interface FakeApi {
  /** Later ones are asked first; the path is without /api. */
  on: (method: string, path: string | RegExp, handler: Handler) => void
  /** Requests that change something, in order. */
  writes: () => Asked[]
  /** Requests of one address that change nothing, in order. */
  reads: (path: string) => Asked[]
}

export function fakeApi(): FakeApi {
  const handlers: Array<{ method: string; path: string | RegExp; handler: Handler }> = []
  const asked: Asked[] = []
  const fetched = async (input: RequestInfo | URL, init: RequestInit = {}): Promise<Response> => {
    const [path = '', query = ''] = String(input)
      .replace(/^\/api/, '')
      .split('?')
    const method = init.method ?? 'GET'
    const one: Asked = {
      method,
      path,
      query: new URLSearchParams(query),
      body: typeof init.body === 'string' ? JSON.parse(init.body) : null,
    }
    asked.push(one)
    const found = handlers.findLast(
      (h) => h.method === method && (typeof h.path === 'string' ? h.path === path : h.path.test(path)),
    )
    const given = found?.handler(one) ?? refusal(404, 'not_found', `The test has no answer for ${method} ${path}.`)
    return new Response(given.status === 204 ? null : JSON.stringify(given.body), {
      status: given.status,
      headers: { 'Content-Type': 'application/json' },
    })
  }
  vi.stubGlobal('fetch', fetched)
  return {
    on: (method, path, handler) => {
      handlers.push({ method, path, handler })
    },
    writes: () => asked.filter((one) => one.method !== 'GET'),
    reads: (path) => asked.filter((one) => one.method === 'GET' && one.path === path),
  }
}

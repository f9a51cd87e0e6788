import type { z } from 'zod'
import { ApiError, errorFromAnswer, LINE_DOWN } from './api-error.ts'

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'

interface Call<S extends z.ZodType> {
  /** What the answer must look like; without it the answer is not read. */
  answer?: S
  /** Sent as JSON, or as it is when it is a form with files. */
  body?: unknown
  signal?: AbortSignal
}

/** Unsafe requests carry it: a page of another site cannot set it. */
const OURS = { 'X-Sheafbook': '1' }

async function call<S extends z.ZodType>(method: Method, path: string, options: Call<S> = {}): Promise<z.infer<S>> {
  const { body, answer, signal } = options
  const isForm = body instanceof FormData
  const answered = await reach(`/api${path}`, {
    method,
    credentials: 'same-origin',
    headers: { ...OURS, ...(body !== undefined && !isForm ? { 'Content-Type': 'application/json' } : {}) },
    ...(body === undefined ? {} : { body: isForm ? body : JSON.stringify(body) }),
    ...(signal ? { signal } : {}),
  })
  const content: unknown = await answered.json().catch(() => null)
  if (!answered.ok) throw errorFromAnswer(answered.status, content, answered.headers.get('Retry-After'))
  if (!answer) return undefined as z.infer<S>
  return understood(answer, content)
}

async function reach(url: string, init: RequestInit): Promise<Response> {
  try {
    return await fetch(url, init)
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause
    throw new ApiError('line_down', LINE_DOWN)
  }
}

/** @throws ApiError `not_understood` when the answer has another shape: the page is older or newer than the server. */
export function understood<S extends z.ZodType>(schema: S, content: unknown): z.infer<S> {
  const parsed = schema.safeParse(content)
  if (parsed.success) return parsed.data
  const first = parsed.error.issues[0]
  const where = first ? ` (${first.path.join('.') || 'answer'}: ${first.message})` : ''
  throw new ApiError('not_understood', `This page and the server differ in version${where}. Load the page again.`)
}

/** JSON over HTTP. Every answer is parsed with its shared schema; every failure is an ApiError. */
export const api = {
  get: <S extends z.ZodType>(path: string, answer: S, signal?: AbortSignal) =>
    call('GET', path, { answer, ...(signal ? { signal } : {}) }),
  post: <S extends z.ZodType>(path: string, body: unknown, answer?: S) =>
    call('POST', path, { body, ...(answer ? { answer } : {}) }),
  put: <S extends z.ZodType>(path: string, body: unknown, answer?: S) =>
    call('PUT', path, { body, ...(answer ? { answer } : {}) }),
  patch: <S extends z.ZodType>(path: string, body: unknown, answer?: S) =>
    call('PATCH', path, { body, ...(answer ? { answer } : {}) }),
  delete: async (path: string): Promise<void> => {
    await call('DELETE', path)
  },
}

/** A path with its query; undefined and empty values are left out. */
export function withQuery(path: string, query: Record<string, string | number | boolean | null | undefined>): string {
  const params = new URLSearchParams()
  for (const [name, value] of Object.entries(query)) {
    if (value !== undefined && value !== null && value !== '') params.set(name, String(value))
  }
  const text = params.toString()
  return text === '' ? path : `${path}?${text}`
}

import { z } from 'zod'

/** The one body every failure has. */
const errorBodySchema = z.object({
  error: z.object({
    code: z.string(),
    message: z.string(),
    issues: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
    requestId: z.string().optional(),
  }),
})

export interface ApiIssue {
  path: string
  message: string
}

/**
 * A request that was refused, failed or never arrived. `code` is that of shared/errors.ts, or one of ours:
 * `line_down` (no answer at all), `unavailable` (5xx), `not_understood` (an answer this page does not know).
 */
export class ApiError extends Error {
  readonly code: string
  readonly status: number
  readonly issues: ApiIssue[]
  /** Seconds after which trying again makes sense, where the server says so. */
  readonly retryAfter_s: number | null

  constructor(code: string, message: string, status = 0, issues: ApiIssue[] = [], retryAfter_s: number | null = null) {
    super(message)
    this.name = 'ApiError'
    this.code = code
    this.status = status
    this.issues = issues
    this.retryAfter_s = retryAfter_s
  }
}

export const LINE_DOWN = 'The line is down: the server did not answer. Nothing was changed.'

const UNAVAILABLE = 'The server could not do this just now. Nothing was changed; try again in a moment.'

/** An error from a refused answer. Texts of 5xx answers are ours: what a server says of itself helps nobody here. */
export function errorFromAnswer(status: number, body: unknown, retryAfter: string | null): ApiError {
  const parsed = errorBodySchema.safeParse(body)
  const wait_s = retryAfter !== null && /^\d+$/.test(retryAfter) ? Number(retryAfter) : null
  if (status >= 500) {
    const full = status === 507
    const text = full ? 'The server has no room left. Nothing was taken in; tell the admin, then send it again.' : UNAVAILABLE
    return new ApiError(full ? 'full' : 'unavailable', text, status, [], wait_s)
  }
  if (!parsed.success) return new ApiError('not_understood', `The server refused this (${status}). Nothing was changed.`, status)
  const { code, message, issues } = parsed.data.error
  return new ApiError(code, message, status, issues ?? [], wait_s)
}

export const isLineDown = (error: unknown): boolean => error instanceof ApiError && error.code === 'line_down'

/** What was asked for is not there, or its address is none: to the reader both are the same. */
export const isNowhere = (error: unknown): boolean =>
  error instanceof ApiError &&
  (error.status === 404 || (error.code === 'invalid' && error.issues.every((i) => /(^|\.)(id|number)$/.test(i.path))))

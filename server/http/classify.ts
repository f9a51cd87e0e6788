/** First what a failure is, then (serialise.ts) how it looks on the wire. */
import { ZodError } from 'zod'
import { type Issue, TransientError, UserError } from '../../shared/errors.ts'
import { isDatabaseAway, isDatabaseFull, isUnstorableText } from '../db/driver-errors.ts'

export interface Failure {
  status: number
  code: string
  message: string
  issues: Issue[]
  retryAfter_s: number | undefined
  /** A mistake of the caller is not reported, a passing trouble is a warning, a bug is an error. */
  level: 'silent' | 'warn' | 'error'
}

const AWAY = 'The database is away for a moment. Nothing was changed. Try again shortly.'
const PASSING = 'This cannot be done at the moment. Nothing was changed. Try again shortly.'
const FULL = 'The disk is full. Nothing was changed. The people who run this machine must make room.'
const NO_TEXT = 'The input holds a character (NUL) that no text can hold. Nothing was saved.'
const BUG =
  'Something in Sheafbook failed. Nothing was changed by this request. Give the request number to the people who run it.'

export function classify(error: unknown): Failure {
  const known = asKnown(error)
  if (known instanceof UserError) {
    const { status, code, message, issues, retryAfter_s } = known
    return { status, code, message, issues, retryAfter_s, level: 'silent' }
  }
  if (known instanceof TransientError) {
    const code = known.full ? 'full' : 'unavailable'
    const message = known.full ? FULL : isDatabaseAway(error) ? AWAY : PASSING
    return { status: known.status, code, message, issues: [], retryAfter_s: known.retryAfter_s, level: 'warn' }
  }
  return { status: 500, code: 'bug', message: BUG, issues: [], retryAfter_s: undefined, level: 'error' }
}

function asKnown(error: unknown): unknown {
  if (isDatabaseAway(error)) return new TransientError(AWAY, { cause: error, retryAfter_s: 2 })
  if (isDatabaseFull(error)) return new TransientError(FULL, { cause: error, full: true })
  if (isUnstorableText(error)) return new UserError('invalid', NO_TEXT, { cause: error })
  return asBodyError(error) ?? error
}

/** What Express and its body parser refuse: they mark it with a status and a type. */
function asBodyError(error: unknown): UserError | null {
  if (error instanceof UserError || error instanceof ZodError || typeof error !== 'object' || error === null) return null
  const { status, type } = error as { status?: unknown; type?: unknown }
  if (status === 413) return new UserError('too_large', 'The request is too large to be taken.', { cause: error })
  if (status === 415)
    return new UserError('wrong_kind', 'The request is written in an encoding that is not taken.', { cause: error })
  if (type === 'entity.parse.failed') return new UserError('invalid', 'The request is not readable JSON.', { cause: error })
  if (status === 400) return new UserError('invalid', 'The request cannot be read as it was sent.', { cause: error })
  return null
}

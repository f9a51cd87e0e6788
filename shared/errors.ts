/** The failures a person can do something about, each with the HTTP status it becomes. */
export const USER_ERROR_STATUS = {
  invalid: 400,
  not_signed_in: 401,
  not_allowed: 403,
  not_found: 404,
  conflict: 409,
  gone: 410,
  changed: 412,
  too_large: 413,
  wrong_kind: 415,
  not_accepted: 422,
  version_needed: 428,
  too_many: 429,
} as const

export type UserErrorCode = keyof typeof USER_ERROR_STATUS

/** One field that was refused: where it stands in the input, and why. */
export interface Issue {
  path: string
  message: string
}

interface UserErrorOptions {
  issues?: Issue[]
  /** Seconds after which trying again makes sense (with `too_many`). */
  retryAfter_s?: number
  cause?: unknown
}

/** A mistake or a refusal (4xx): the message is shown as it is, nothing is reported to the people who run the machine. */
export class UserError extends Error {
  readonly code: UserErrorCode
  readonly issues: Issue[]
  readonly retryAfter_s: number | undefined

  constructor(code: UserErrorCode, message: string, options: UserErrorOptions = {}) {
    super(message, { cause: options.cause })
    this.name = 'UserError'
    this.code = code
    this.issues = options.issues ?? []
    this.retryAfter_s = options.retryAfter_s
  }

  get status(): number {
    return USER_ERROR_STATUS[this.code]
  }
}

/** A passing trouble (database away, disk full, store unreachable): try again later; 503, or 507 when `full`. */
export class TransientError extends Error {
  readonly full: boolean
  readonly retryAfter_s: number

  constructor(message: string, options: { cause?: unknown; full?: boolean; retryAfter_s?: number } = {}) {
    super(message, { cause: options.cause })
    this.name = 'TransientError'
    this.full = options.full ?? false
    this.retryAfter_s = options.retryAfter_s ?? 5
  }

  get status(): number {
    return this.full ? 507 : 503
  }
}

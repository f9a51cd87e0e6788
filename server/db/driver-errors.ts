/** What the database refused, told by the driver's code (PostgreSQL manual, appendix A), never by its wording. */

import { UserError } from '../../shared/errors.ts'

interface DriverError {
  code?: string
  constraint?: string
  message?: string
}

/** TypeORM wraps what the driver threw. */
function driverErrorOf(error: unknown): DriverError | null {
  if (typeof error !== 'object' || error === null) return null
  const inner = (error as { driverError?: unknown }).driverError
  return typeof inner === 'object' && inner !== null ? inner : error
}

/** A unique index refused the row; `constraint` narrows it to one index. */
export function isUniqueViolation(error: unknown, constraint?: string): boolean {
  const found = driverErrorOf(error)
  return found?.code === '23505' && (constraint === undefined || found.constraint === constraint)
}

/** A row it names does not exist, or a row that names it still does. */
export const isForeignKeyViolation = (error: unknown): boolean => driverErrorOf(error)?.code === '23503'

/** Text with a NUL, which PostgreSQL cannot hold, as text or inside JSON. */
export const isUnstorableText = (error: unknown): boolean => ['22021', '22P05'].includes(driverErrorOf(error)?.code ?? '')

const AWAY_CODES = new Set(['ECONNREFUSED', 'ECONNRESET', 'ENOTFOUND', 'EPIPE', 'ETIMEDOUT', '57P01', '57P02', '57P03', '53300'])
/** The driver gives these two no code. */
const AWAY_TEXTS = /Connection terminated|timeout exceeded when trying to connect|Client has encountered a connection error/

/** The database is away or restarting: the same request may do in a moment. */
export function isDatabaseAway(error: unknown): boolean {
  const found = driverErrorOf(error)
  if (!found) return false
  const code = found.code ?? ''
  return AWAY_CODES.has(code) || code.startsWith('08') || AWAY_TEXTS.test(found.message ?? '')
}

/** No room on the database's disk. */
export const isDatabaseFull = (error: unknown): boolean => driverErrorOf(error)?.code === '53100'

/**
 * Runs a write and turns a refusal by one of the named unique indexes into a conflict that names the field.
 * @throws UserError `conflict`
 */
export async function orConflict<T>(write: Promise<T>, indexes: Record<string, { path: string; message: string }>): Promise<T> {
  try {
    return await write
  } catch (cause) {
    const issue = indexes[driverErrorOf(cause)?.constraint ?? '']
    if (!issue || !isUniqueViolation(cause)) throw cause
    throw new UserError('conflict', `${issue.message} Nothing was saved.`, { issues: [issue], cause })
  }
}

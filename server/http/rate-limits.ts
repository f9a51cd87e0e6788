/** Attempts, counted in PostgreSQL so that every process sees the same count. */
import { createHash } from 'node:crypto'
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible'
import { UserError } from '../../shared/errors.ts'
import type { DataSource } from '../db/database.ts'
import { poolOf } from '../db/pool.ts'

export interface Limit {
  name: string
  points: number
  per_s: number
}

const limiters = new WeakMap<DataSource, Map<string, RateLimiterPostgres>>()

function limiterOf(source: DataSource, { name, points, per_s }: Limit): RateLimiterPostgres {
  const known = limiters.get(source) ?? new Map<string, RateLimiterPostgres>()
  limiters.set(source, known)
  const found = known.get(name) ?? makeLimiter(source, { name, points, per_s })
  known.set(name, found)
  return found
}

function makeLimiter(source: DataSource, { name, points, per_s }: Limit): RateLimiterPostgres {
  return new RateLimiterPostgres({
    storeClient: poolOf(source),
    storeType: 'pool',
    tableName: 'rate_limits',
    tableCreated: true,
    keyPrefix: name,
    points,
    duration: per_s,
  })
}

/** Addresses do not stand in the table in clear. */
const keyOf = (who: string) => createHash('sha256').update(who).digest('base64url')

/**
 * Counts one attempt before it is made, so that attempts side by side cannot slip through together.
 * @throws UserError `too_many` with the seconds to wait
 */
export async function countAttempt(source: DataSource, limit: Limit, who: string, message: string): Promise<void> {
  try {
    await limiterOf(source, limit).consume(keyOf(who))
  } catch (refused) {
    if (!(refused instanceof RateLimiterRes)) throw refused
    const retryAfter_s = Math.max(1, Math.ceil(refused.msBeforeNext / 1000))
    throw new UserError('too_many', `${message} Try again in ${retryAfter_s} s.`, { retryAfter_s })
  }
}

/** Takes an attempt back that turned out well: only failures count. */
export async function forgiveAttempt(source: DataSource, limit: Limit, who: string): Promise<void> {
  await limiterOf(source, limit).reward(keyOf(who))
}

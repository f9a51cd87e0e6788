import type { ApiToken, Scope } from '../../../shared/schemas/token.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../database.ts'
import { findActiveUser } from './user.ts'

interface Row extends Omit<ApiToken, 'createdAt' | 'expiresAt' | 'lastUsedAt' | 'revokedAt'> {
  createdAt: Date
  expiresAt: Date
  lastUsedAt: Date | null
  revokedAt: Date | null
}

const COLUMNS = `id, name, ending, scopes, created_at AS "createdAt", expires_at AS "expiresAt", last_used_at AS "lastUsedAt",
  revoked_at AS "revokedAt"`

const toToken = (row: Row): ApiToken => ({
  ...row,
  createdAt: row.createdAt.toISOString(),
  expiresAt: row.expiresAt.toISOString(),
  lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
  revokedAt: row.revokedAt?.toISOString() ?? null,
})

export interface NewToken {
  userId: string
  name: string
  ending: string
  tokenHash: string
  scopes: readonly Scope[]
  days: number
}

export async function addToken(db: Db, { userId, name, ending, tokenHash, scopes, days }: NewToken): Promise<ApiToken> {
  const rows = await db.query<Row[]>(
    `INSERT INTO api_tokens (user_id, name, ending, token_hash, scopes, expires_at)
     VALUES ($1, $2, $3, $4, $5, now() + make_interval(days => $6)) RETURNING ${COLUMNS}`,
    [userId, name, ending, tokenHash, scopes, days],
  )
  return toToken(rows[0]!)
}

/** Newest first, with those that are worth nothing any more. */
export async function listTokens(db: Db, userId: string): Promise<ApiToken[]> {
  const rows = await db.query<Row[]>(
    `SELECT ${COLUMNS} FROM api_tokens WHERE user_id = $1 ORDER BY created_at DESC, id LIMIT 200`,
    [userId],
  )
  return rows.map(toToken)
}

export async function countLiveTokens(db: Db, userId: string): Promise<number> {
  const [row] = await db.query<{ n: number }[]>(
    'SELECT count(*)::int AS n FROM api_tokens WHERE user_id = $1 AND revoked_at IS NULL AND expires_at > now()',
    [userId],
  )
  return row?.n ?? 0
}

/** null when this person has no such token, or it was revoked before. */
export async function revokeToken(db: Db, userId: string, id: string): Promise<ApiToken | null> {
  const [rows] = await db.query<[Row[], number]>(
    `UPDATE api_tokens SET revoked_at = now() WHERE id = $1 AND user_id = $2 AND revoked_at IS NULL RETURNING ${COLUMNS}`,
    [id, userId],
  )
  return rows[0] ? toToken(rows[0]) : null
}

export interface AcceptedToken {
  id: string
  scopes: Scope[]
  user: User
}

/** A token that is worth something now, with the person it stands for; notes that it was used, once a minute at most. */
export async function acceptToken(db: Db, tokenHash: string): Promise<AcceptedToken | null> {
  const [row] = await db.query<{ id: string; userId: string; scopes: Scope[]; stale: boolean }[]>(
    `SELECT id, user_id AS "userId", scopes, coalesce(last_used_at < now() - interval '1 minute', true) AS stale
     FROM api_tokens WHERE token_hash = $1 AND revoked_at IS NULL AND expires_at > now()`,
    [tokenHash],
  )
  const user = row ? await findActiveUser(db, row.userId) : null
  if (!row || !user) return null
  if (row.stale) await db.query('UPDATE api_tokens SET last_used_at = now() WHERE id = $1', [row.id])
  return { id: row.id, scopes: row.scopes, user }
}

import type { OneTimeLink } from '../../../shared/schemas/user.ts'
import type { Db } from '../database.ts'

export interface FoundLink {
  userId: string | null
  kind: OneTimeLink['kind']
}

/** Keeps the hash of a new token for `hours`; an older unused link of the same kind and person is worth nothing from now on. */
export async function addLink(db: Db, link: FoundLink & { tokenHash: string; hours: number }): Promise<void> {
  const { userId, kind, tokenHash, hours } = link
  await db.query(
    'UPDATE user_links SET used_at = now() WHERE kind = $1 AND user_id IS NOT DISTINCT FROM $2 AND used_at IS NULL',
    [kind, userId],
  )
  await db.query(
    'INSERT INTO user_links (user_id, kind, token_hash, expires_at) VALUES ($1, $2, $3, now() + make_interval(hours => $4))',
    [userId, kind, tokenHash, hours],
  )
}

/** An unused link that has not run out; null for any other. */
export async function findLink(db: Db, tokenHash: string): Promise<FoundLink | null> {
  const [row] = await db.query<FoundLink[]>(
    'SELECT user_id AS "userId", kind FROM user_links WHERE token_hash = $1 AND used_at IS NULL AND expires_at > now()',
    [tokenHash],
  )
  return row ?? null
}

/** Uses it up; of two at the same time one gets it. */
export async function takeLink(db: Db, tokenHash: string): Promise<FoundLink | null> {
  const [rows] = await db.query<[FoundLink[], number]>(
    `UPDATE user_links SET used_at = now() WHERE token_hash = $1 AND used_at IS NULL AND expires_at > now()
     RETURNING user_id AS "userId", kind`,
    [tokenHash],
  )
  return rows[0] ?? null
}

/** One-time links: 256 random bits in the address, their hash in the table. */
import { createHash, randomBytes } from 'node:crypto'
import { UserError } from '../../../shared/errors.ts'
import type { OneTimeLink, User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { findUser } from '../../db/repositories/user.ts'
import { addLink, findLink, takeLink } from '../../db/repositories/user-link.ts'

const HOURS: Record<OneTimeLink['kind'], number> = { invitation: 7 * 24, reset: 1, 'first admin': 24 }

const hashOf = (token: string) => createHash('sha256').update(token).digest('hex')

/** The token of a new link; it is nowhere but in the answer. */
export async function makeLink(db: Db, kind: OneTimeLink['kind'], userId: string | null): Promise<string> {
  const token = randomBytes(32).toString('base64url')
  await addLink(db, { userId, kind, tokenHash: hashOf(token), hours: HOURS[kind] })
  return token
}

/** What people open. */
export const linkUrl = (publicUrl: string, token: string) => `${publicUrl}/link/${token}`

const gone = () => new UserError('gone', 'This link was used before or has run out. Ask for a new one.')

/**
 * What a link is for, without using it up.
 * @throws UserError `gone`
 */
export async function describeLink(db: Db, token: string): Promise<OneTimeLink> {
  const link = await findLink(db, hashOf(token))
  if (!link) throw gone()
  const user = link.userId === null ? null : await findUser(db, link.userId)
  if (user && !user.active) throw gone()
  return { kind: link.kind, name: user?.name ?? null, email: user?.email ?? null }
}

/**
 * Uses up a link that belongs to a person.
 * @throws UserError `gone`, also for somebody who was disabled since
 */
export async function redeemLink(db: Db, token: string): Promise<{ user: User; kind: OneTimeLink['kind'] }> {
  const link = await takeLink(db, hashOf(token))
  const user = link?.userId ? await findUser(db, link.userId) : null
  if (!link || !user?.active) throw gone()
  return { user, kind: link.kind }
}

/** @throws UserError `gone` */
export async function redeemFirstAdminLink(db: Db, token: string): Promise<void> {
  const link = await takeLink(db, hashOf(token))
  if (link?.kind !== 'first admin') throw gone()
}

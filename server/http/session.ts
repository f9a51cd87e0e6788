/** Sessions in PostgreSQL; the table holds a hash of the id, so that a copy of it signs nobody in. */
import { createHash, randomBytes } from 'node:crypto'
import connectPgSimple from 'connect-pg-simple'
import type { RequestHandler } from 'express'
import session, { type SessionData } from 'express-session'
import { SESSION_IDLE } from '../../shared/limits.ts'
import type { Role } from '../../shared/schemas/user.ts'
import { poolOf } from '../db/pool.ts'
import type { Deps } from './route.ts'

type Done = (error?: unknown) => void

const hashed = (sid: string) => createHash('sha256').update(sid).digest('hex')

class HashedStore extends connectPgSimple(session) {
  override get(sid: string, done: (error: unknown, found?: SessionData | null) => void): void {
    super.get(hashed(sid), done)
  }
  override set(sid: string, data: SessionData, done?: Done): void {
    super.set(hashed(sid), data, done)
  }
  override destroy(sid: string, done?: Done): void {
    super.destroy(hashed(sid), done)
  }
  override touch(sid: string, data: SessionData, done?: () => void): void {
    super.touch(hashed(sid), data, done)
  }
}

/** How long an unused session of this role lives, in milliseconds. */
export function idle_ms(role: Role): number {
  if (role === 'admin') return SESSION_IDLE.admin_s * 1000
  return (role === 'demonstrator' ? SESSION_IDLE.phone_s : SESSION_IDLE.desk_s) * 1000
}

/** `__Host-` binds the cookie to this host, but browsers take it over https only. */
export const cookieName = (publicUrl: string) => (publicUrl.startsWith('https:') ? '__Host-sheafbook' : 'sheafbook')

export function sessions({ source, settings }: Deps, onError: (error: unknown) => void): RequestHandler {
  return session({
    name: cookieName(settings.publicUrl),
    secret: settings.sessionSecret,
    store: new HashedStore({ pool: poolOf(source), tableName: 'session', errorLog: onError }),
    genid: () => randomBytes(32).toString('base64url'),
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { path: '/', httpOnly: true, sameSite: 'lax', secure: settings.publicUrl.startsWith('https:') },
  })
}

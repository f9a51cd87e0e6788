/**
 * A browser that somebody signed in with before keeps a mark of it. Failures from it are counted apart from those of strangers:
 * whoever guesses at an account from elsewhere slows down themselves and every unknown browser, not its owner.
 */
import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto'
import type { Request, Response } from 'express'
import type { Deps } from '../../http/route.ts'

const DAYS_180_MS = 180 * 24 * 3600 * 1000

type Known = Pick<Deps, 'settings'>

const isHttps = ({ settings }: Known) => settings.publicUrl.startsWith('https:')
const nameOf = (deps: Known) => (isHttps(deps) ? '__Host-sheafbook-known' : 'sheafbook-known')

/** Bound to the address: a mark earned with one account says nothing of another. */
const sign = ({ settings }: Known, nonce: string, email: string) =>
  createHmac('sha256', settings.sessionSecret).update(`known browser|${nonce}|${email}`).digest('base64url')

/** What failures of this attempt are counted under. */
export function bucketOf(deps: Known, req: Request, email: string): string {
  const [nonce = '', signature = ''] = (readCookie(req, nameOf(deps)) ?? '').split('.')
  const given = Buffer.from(signature)
  const right = Buffer.from(sign(deps, nonce, email))
  const known = given.length === right.length && timingSafeEqual(given, right)
  return known ? `browser ${nonce} ${email}` : `account ${email}`
}

export function markKnown(deps: Known, res: Response, email: string): void {
  const nonce = randomBytes(16).toString('base64url')
  res.cookie(nameOf(deps), `${nonce}.${sign(deps, nonce, email)}`, {
    httpOnly: true,
    sameSite: 'lax',
    secure: isHttps(deps),
    path: '/',
    maxAge: DAYS_180_MS,
  })
}

function readCookie(req: Request, name: string): string | undefined {
  const pairs = (req.headers.cookie ?? '').split('; ')
  return pairs.find((pair) => pair.startsWith(`${name}=`))?.slice(name.length + 1)
}

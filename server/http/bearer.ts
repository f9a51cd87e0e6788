/** Calls that carry a token (RFC 6750): who stands behind it, and what for. They have no session and need none. */
import { createHash } from 'node:crypto'
import type { NextFunction, Request, RequestHandler, Response } from 'express'
import { UserError } from '../../shared/errors.ts'
import { type Scope, TOKEN_LIMITS } from '../../shared/schemas/token.ts'
import { acceptToken } from '../db/repositories/api-token.ts'
import { countAttempt } from './rate-limits.ts'
import type { Deps } from './route.ts'

declare global {
  namespace Express {
    interface Request {
      /** Set when the call came with a token. */
      scopes?: readonly Scope[]
    }
  }
}

const BEARER = /^Bearer +([\w.~+/-]+=*)$/i
const LIMIT = { name: 'token', points: TOKEN_LIMITS.calls_per_min, per_s: 60 }

/** What is kept of a token; 256 random bits need no slow hash. */
export const hashOfToken = (token: string) => createHash('sha256').update(token).digest('hex')

/** Puts `req.user` and `req.scopes` in place when a token comes, and leaves every other call as it is. */
export function readToken({ source }: Pick<Deps, 'source'>): RequestHandler {
  return async (req: Request, res: Response, next: NextFunction) => {
    const header = req.get('authorization')
    // Another scheme is for a proxy in front of us.
    if (header === undefined || !/^Bearer\b/i.test(header)) return next()
    const token = BEARER.exec(header)?.[1]
    const used = token === undefined ? null : await acceptToken(source.manager, hashOfToken(token))
    if (!used) {
      res.set('WWW-Authenticate', 'Bearer error="invalid_token"')
      throw new UserError('not_signed_in', 'This token is not known, has run out or was revoked.')
    }
    await countAttempt(source, LIMIT, used.id, `A token may be used ${TOKEN_LIMITS.calls_per_min} times a minute.`)
    req.user = used.user
    req.scopes = used.scopes
    next()
  }
}

/** For what belongs to browsers alone: sessions and their protection. */
export const unlessToken =
  (handler: RequestHandler): RequestHandler =>
  (req, res, next) => {
    if (req.scopes) next()
    else void handler(req, res, next)
  }

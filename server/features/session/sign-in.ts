/** Passport's part: from a checked person to a session, and from a session back to a person on every request. */
import type { Request, RequestHandler } from 'express'
import { Passport } from 'passport'
import { Strategy } from 'passport-local'
import type { User } from '../../../shared/schemas/user.ts'
import { findActiveUser } from '../../db/repositories/user.ts'
import type { Deps } from '../../http/route.ts'
import { idle_ms } from '../../http/session.ts'
import { bucketOf, markKnown } from './known-browser.ts'
import { checkSignIn, wrongSignIn } from './session.service.ts'

type SignInDeps = Pick<Deps, 'source' | 'settings'>
type Authenticator = InstanceType<typeof Passport>
const authenticators = new WeakMap<Deps['source'], Authenticator>()

function authenticatorOf(deps: SignInDeps): Authenticator {
  const known = authenticators.get(deps.source)
  if (known) return known
  const made = new Passport()
  made.use(
    new Strategy({ usernameField: 'email', session: false, passReqToCallback: true }, (req, email, password, done) => {
      checkSignIn(deps, { email, password }, bucketOf(deps, req, email)).then((user) => done(null, user ?? false), done)
    }),
  )
  made.serializeUser((user, done) => done(null, (user as User).id))
  // Asked on every request: somebody disabled is anonymous from the next one on, and a new role counts at once.
  made.deserializeUser((id, done) => {
    findActiveUser(deps.source.manager, String(id)).then((user) => done(null, user ?? false), done)
  })
  authenticators.set(deps.source, made)
  return made
}

/** Puts `req.user` in place. */
export function signedInPeople(deps: SignInDeps): RequestHandler[] {
  return [authenticatorOf(deps).session() as RequestHandler, keepIdleTime]
}

/** A session lives as long unused as the person's role allows now. */
const keepIdleTime: RequestHandler = (req, _res, next) => {
  const user = req.user as User | undefined
  if (user && req.session.cookie.originalMaxAge !== idle_ms(user.role)) req.session.cookie.maxAge = idle_ms(user.role)
  next()
}

/**
 * Checks e-mail and password of the request's body.
 * @throws UserError `not_signed_in` (the same for an unknown address and a wrong password) or `too_many`
 */
export function authenticate(deps: SignInDeps, req: Request): Promise<User> {
  return new Promise((resolve, reject) => {
    const check = authenticatorOf(deps).authenticate('local', (error: unknown, user: User | false) => {
      if (error) reject(error)
      else if (user) resolve(user)
      else reject(wrongSignIn())
    }) as RequestHandler
    check(req, req.res!, reject)
  })
}

/** Opens a new session (a new id: one planted before the sign-in is worth nothing) for this person. */
export async function openSession(deps: SignInDeps, req: Request, user: User): Promise<void> {
  await new Promise<void>((resolve, reject) => req.logIn(user, (error: unknown) => (error ? reject(error) : resolve())))
  req.session.cookie.maxAge = idle_ms(user.role)
  if (req.res) markKnown(deps, req.res, user.email)
}

export async function closeSession(req: Request): Promise<void> {
  await new Promise<void>((resolve, reject) => req.session.destroy((error: unknown) => (error ? reject(error) : resolve())))
}

import { UserError } from '../../shared/errors.ts'
import type { Scope } from '../../shared/schemas/token.ts'
import type { User } from '../../shared/schemas/user.ts'
import type { Access, Route } from './route.ts'

/**
 * May this person call a route? Whose object it is, is the service's question.
 * @throws UserError `not_signed_in` or `not_allowed`
 */
export function checkAccess(access: Access, actor: User | null): void {
  if (access === 'anyone') return
  if (!actor) throw new UserError('not_signed_in', 'Sign in first.')
  if (access === 'signed in' || access.includes(actor.role)) return
  throw new UserError('not_allowed', `This is open to ${access.join(', ')}; you are signed in as ${actor.role}.`)
}

/**
 * May a token be used for a route? Whose object it is and what the person may do is asked beside it.
 * @param scopes what the token is for; undefined where no token came
 * @throws UserError `not_allowed`
 */
export function checkScope(route: Pick<Route, 'access' | 'scope'>, scopes: readonly Scope[] | undefined): void {
  if (scopes === undefined || route.access === 'anyone') return
  if (route.scope === undefined) throw new UserError('not_allowed', 'This is not open to tokens. Sign in for it.')
  if (!scopes.includes(route.scope)) throw new UserError('not_allowed', `This needs a token with the scope "${route.scope}".`)
}

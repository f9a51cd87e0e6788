import { UserError } from '../../shared/errors.ts'
import type { User } from '../../shared/schemas/user.ts'
import type { Access } from './route.ts'

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

import { UserError } from '../../../shared/errors.ts'
import { RATE_LIMITS } from '../../../shared/limits.ts'
import type { SignIn, User } from '../../../shared/schemas/user.ts'
import { findCredentials } from '../../db/repositories/user.ts'
import { countAttempt, forgiveAttempt, type Limit } from '../../http/rate-limits.ts'
import type { Deps } from '../../http/route.ts'
import { verifyPassword } from './password.ts'

const LIMITS: readonly Limit[] = [
  { name: 'sign-in-min', points: RATE_LIMITS.failures_per_min, per_s: 60 },
  { name: 'sign-in-h', points: RATE_LIMITS.failures_per_h, per_s: 3600 },
]
const SLOW_DOWN = 'Too many attempts to sign in with this address.'

/**
 * Checks address and password. `bucket` is what failures are counted under: the account, or a browser that knows it already.
 * @returns null when either is wrong; both take the same time
 * @throws UserError `too_many` after five failures a minute
 */
export async function checkSignIn(deps: Pick<Deps, 'source'>, { email, password }: SignIn, bucket: string): Promise<User | null> {
  for (const limit of LIMITS) await countAttempt(deps.source, limit, bucket, SLOW_DOWN)
  const found = await findCredentials(deps.source.manager, email)
  const right = await verifyPassword(found?.passwordHash ?? null, password)
  if (!right || !found) return null
  for (const limit of LIMITS) await forgiveAttempt(deps.source, limit, bucket)
  return found.user
}

export const wrongSignIn = () =>
  new UserError('not_signed_in', 'Address and password do not belong together. Nobody was signed in.')

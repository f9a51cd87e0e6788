/** Hashing, slow on purpose, and never more than two at once: a burst of sign-ins may not take the machine's memory. */
import { hash, verify } from '@node-rs/argon2'
import { ARGON2_COST, PASSWORD_LIMITS } from '../../../shared/limits.ts'
import { createTurns } from './turns.ts'

/** About three seconds' worth in line at 57 ms a hash; whoever comes then is told to try again. */
const MOST_WAITING = 100
const inTurn = createTurns(PASSWORD_LIMITS.hashes_at_once, MOST_WAITING)

const COST = { memoryCost: ARGON2_COST.memory_kib, timeCost: ARGON2_COST.passes, parallelism: ARGON2_COST.lanes }

/** argon2id (the library's default kind) in its usual text form. */
export const hashPassword = (password: string): Promise<string> => inTurn(() => hash(password, COST))

let nobody: Promise<string> | undefined

/** Without a hash (nobody by that address) it works as long as with one and says no. */
export async function verifyPassword(passwordHash: string | null, password: string): Promise<boolean> {
  nobody ??= hash('nobody signs in with this', COST)
  const against = passwordHash ?? (await nobody)
  const right = await inTurn(() => verify(against, password))
  return right && passwordHash !== null
}

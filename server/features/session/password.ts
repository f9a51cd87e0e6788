/** Hashing, slow on purpose, and never more than two at once: a burst of sign-ins may not take the machine's memory. */
import { hash, verify } from '@node-rs/argon2'
import { ARGON2_COST, PASSWORD_LIMITS } from '../../../shared/limits.ts'

let free = PASSWORD_LIMITS.hashes_at_once as number
const waiting: (() => void)[] = []

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (free > 0) free -= 1
  else await new Promise<void>((resolve) => waiting.push(resolve))
  try {
    return await work()
  } finally {
    const next = waiting.shift()
    if (next) next()
    else free += 1
  }
}

const COST = { memoryCost: ARGON2_COST.memory_kib, timeCost: ARGON2_COST.passes, parallelism: ARGON2_COST.lanes }

/** argon2id (the library's default kind) in its usual text form. */
export const hashPassword = (password: string): Promise<string> => inTurn(() => hash(password, COST))

let nobody: Promise<string> | undefined

/** Without a hash (nobody by that address) it works as long as with one and says no. */
export async function verifyPassword(passwordHash: string | null, password: string): Promise<boolean> {
  nobody ??= hashPassword('nobody signs in with this')
  const against = passwordHash ?? (await nobody)
  const right = await inTurn(() => verify(against, password))
  return right && passwordHash !== null
}

import { hash } from '@node-rs/argon2'
import type { Db } from '../../server/db/database.ts'
import { addUser, type NewUser, nextUserNumber } from '../../server/db/repositories/user.ts'
import type { User } from '../../shared/schemas/user.ts'

/** What every test person signs in with. */
export const TEST_PASSWORD = 'wet clay sticks to boots'
/** Cheap on purpose: only the tests of signing in look at what a hash costs. */
const testHash = hash(TEST_PASSWORD, { memoryCost: 1024, timeCost: 1, parallelism: 1 })

/** A saved person, able to sign in with TEST_PASSWORD unless told otherwise. */
export async function createUser(db: Db, overrides: Partial<NewUser> = {}): Promise<User> {
  const number = overrides.number ?? (await nextUserNumber(db))
  return addUser(db, {
    number,
    name: `Person ${number}`,
    email: `person-${number}@fields.example`,
    role: 'demonstrator',
    passwordHash: await testHash,
    ...overrides,
  })
}

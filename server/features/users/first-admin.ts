/** An empty installation has nobody who could invite anybody: the start command prints one link. */
import type { z } from 'zod'
import { UserError } from '../../../shared/errors.ts'
import type { firstAdminSchema, User } from '../../../shared/schemas/user.ts'
import type { DataSource } from '../../db/database.ts'
import { addUser, lockActiveAdmins, nextUserNumber } from '../../db/repositories/user.ts'
import { hashPassword } from '../session/password.ts'
import { writeTrail } from '../trail/trail.service.ts'
import { describeLink, makeLink, redeemFirstAdminLink } from './links.ts'
import { checkStrength } from './password-strength.ts'

/**
 * The token of a link that makes the first admin: PUBLIC_URL/link/TOKEN, good for a day; a link printed before is void.
 * @throws UserError `conflict` when there is an admin
 */
export async function createFirstAdminLink(source: DataSource): Promise<string> {
  return source.transaction(async (db) => {
    if ((await lockActiveAdmins(db)).length > 0)
      throw new UserError('conflict', 'There is an admin already: ask for an invitation.')
    return makeLink(db, 'first admin', null)
  })
}

/** @throws UserError `gone`, `conflict` or `invalid` */
export async function makeFirstAdmin(source: DataSource, input: z.infer<typeof firstAdminSchema>): Promise<User> {
  const { token, password, name, email } = input
  await describeLink(source.manager, token)
  checkStrength(password, [name, email])
  const passwordHash = await hashPassword(password)
  return source.transaction(async (db) => {
    await redeemFirstAdminLink(db, token)
    if ((await lockActiveAdmins(db)).length > 0)
      throw new UserError('conflict', 'There is an admin already: ask for an invitation.')
    const user = await addUser(db, { number: await nextUserNumber(db), name, email, role: 'admin', passwordHash })
    await writeTrail(db, {
      actor: user,
      action: 'add',
      subject: 'user',
      subjectId: user.id,
      text: `${name} became the first admin`,
    })
    return user
  })
}

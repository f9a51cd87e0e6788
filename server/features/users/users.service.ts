import { UserError } from '../../../shared/errors.ts'
import type { InviteUser, UpdateUser, User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { addUser, changeUser, endSessions, findUser, lockActiveAdmins } from '../../db/repositories/user.ts'
import type { Deps } from '../../http/route.ts'
import { queueMail } from '../mails/mails.service.ts'
import { writeTrail } from '../trail/trail.service.ts'
import { linkUrl, makeLink } from './links.ts'

/** @throws UserError `conflict` when number or address is taken */
export async function inviteUser(deps: Deps, actor: User, input: InviteUser): Promise<User> {
  return deps.source.transaction(async (db) => {
    const user = await addUser(db, input)
    const text = `${user.name}, no. ${user.number}, added as ${user.role}`
    await writeTrail(db, { actor, action: 'add', subject: 'user', subjectId: user.id, text })
    await sendInvitation(deps, db, actor, user)
    return user
  })
}

/** @throws UserError `not_found`, or `conflict` when they can sign in already */
export async function inviteAgain(deps: Deps, actor: User, id: string): Promise<User> {
  return deps.source.transaction(async (db) => {
    const user = await getUser(db, id)
    if (user.hasPassword)
      throw new UserError('conflict', `${user.name} has a password; a forgotten one is renewed from the sign-in page.`)
    if (!user.active) throw new UserError('conflict', `${user.name} is disabled. Enable them first.`)
    await sendInvitation(deps, db, actor, user)
    return user
  })
}

async function sendInvitation(deps: Deps, db: Db, actor: User, user: User): Promise<void> {
  const token = await makeLink(db, 'invitation', user.id)
  await queueMail(deps, db, {
    to: user.email,
    subject: 'Sheafbook: your invitation',
    text: [
      `${user.name},`,
      `${actor.name} invites you to Sheafbook as ${user.role}. Open this page within seven days to set your password:`,
      linkUrl(deps.settings.publicUrl, token),
    ].join('\n\n'),
  })
  const text = `Invitation sent to ${user.name}`
  await writeTrail(db, { actor, action: 'invite', subject: 'user', subjectId: user.id, text })
}

/**
 * Changes name, role or whether they may sign in; the new role counts from their next request on, and a disabled person's
 * sessions end.
 * @throws UserError `not_found`, or `conflict` when no admin would be left
 */
export async function updateUser(deps: Deps, actor: User, id: string, change: UpdateUser): Promise<User> {
  return deps.source.transaction(async (db) => {
    const admins = await lockActiveAdmins(db)
    const before = await getUser(db, id)
    const staysAdmin = (change.role ?? before.role) === 'admin' && (change.active ?? before.active)
    if (!staysAdmin && admins.length === 1 && admins[0] === id) {
      throw new UserError('conflict', 'This is the only admin. Make somebody else an admin first. Nothing was changed.')
    }
    await changeUser(db, id, change)
    const after = await getUser(db, id)
    if (!after.active) await endSessions(db, id)
    const said = describeChange(before, after)
    if (said) await writeTrail(db, { actor, action: 'change', subject: 'user', subjectId: id, text: `${before.name}: ${said}` })
    return after
  })
}

async function getUser(db: Db, id: string): Promise<User> {
  const user = await findUser(db, id)
  if (!user) throw new UserError('not_found', 'There is nobody with this id.')
  return user
}

function describeChange(before: User, after: User): string {
  const fields = ['name', 'role', 'active'] as const
  const changed = fields.filter((field) => before[field] !== after[field])
  return changed.map((field) => `${field} ${before[field]} to ${after[field]}`).join(', ')
}

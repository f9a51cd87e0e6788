import type { z } from 'zod'
import { RATE_LIMITS } from '../../../shared/limits.ts'
import type { setPasswordSchema, User } from '../../../shared/schemas/user.ts'
import { endSessions, findUser, findUserByEmail, setPasswordHash } from '../../db/repositories/user.ts'
import { countAttempt } from '../../http/rate-limits.ts'
import type { Deps } from '../../http/route.ts'
import { queueMail } from '../mails/mails.service.ts'
import { hashPassword } from '../session/password.ts'
import { writeTrail } from '../trail/trail.service.ts'
import { describeLink, linkUrl, makeLink, redeemLink } from './links.ts'
import { checkStrength } from './password-strength.ts'

const RESETS = { name: 'reset-h', points: RATE_LIMITS.failures_per_min, per_s: 3600 }

/** Sends a link if somebody has this address; the answer is the same either way, so it tells nobody who is known here. */
export async function requestReset(deps: Deps, email: string): Promise<void> {
  await countAttempt(deps.source, RESETS, email, 'Too many links were asked for with this address.')
  const user = await findUserByEmail(deps.source.manager, email)
  if (!user?.active) return
  await deps.source.transaction(async (db) => {
    const token = await makeLink(db, 'reset', user.id)
    await queueMail(deps, db, {
      to: user.email,
      subject: 'Sheafbook: set a new password',
      text: [
        `${user.name},`,
        'somebody asked for a new password for this address. Open this page within an hour to set one:',
        linkUrl(deps.settings.publicUrl, token),
        'If it was not you, leave this mail alone: nothing changes.',
      ].join('\n\n'),
    })
    await writeTrail(db, {
      actor: null,
      action: 'send link',
      subject: 'user',
      subjectId: user.id,
      text: `Reset link sent to ${user.name}`,
    })
  })
}

/**
 * Sets the password a link allows to set, and ends every session the person had.
 * @throws UserError `gone` for a used link, `invalid` for a weak password (the link stays good)
 */
export async function setPassword(deps: Deps, { token, password }: z.infer<typeof setPasswordSchema>): Promise<User> {
  const { name, email } = await describeLink(deps.source.manager, token)
  checkStrength(
    password,
    [name, email].filter((own) => own !== null),
  )
  const passwordHash = await hashPassword(password)
  return deps.source.transaction(async (db) => {
    const { user, kind } = await redeemLink(db, token)
    await setPasswordHash(db, user.id, passwordHash)
    await endSessions(db, user.id)
    await writeTrail(db, {
      actor: user,
      action: 'set password',
      subject: 'user',
      subjectId: user.id,
      text: `${user.name} set a password by ${kind}`,
    })
    return (await findUser(db, user.id)) ?? user
  })
}

/** Tokens for programs. Only their hash is kept. */
import { randomBytes } from 'node:crypto'
import { UserError } from '../../../shared/errors.ts'
import { type ApiToken, type CreatedToken, type CreateToken, TOKEN_LIMITS } from '../../../shared/schemas/token.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { addToken, countLiveTokens, listTokens, revokeToken } from '../../db/repositories/api-token.ts'
import { addTrailLine } from '../../db/repositories/trail.ts'
import { hashOfToken } from '../../http/bearer.ts'
import type { Deps } from '../../http/route.ts'

/** Lets whoever finds one in a file see what it is. */
const PREFIX = 'sheafbook_'
const ENDING_CHARS = 4

export const listOwnTokens = (deps: Deps, actor: User): Promise<ApiToken[]> => listTokens(deps.source.manager, actor.id)

/** @throws UserError `conflict` when this person has as many as they may */
export async function createToken(deps: Deps, actor: User, { name, scopes, days }: CreateToken): Promise<CreatedToken> {
  const token = PREFIX + randomBytes(32).toString('base64url')
  return deps.source.transaction(async (db) => {
    if ((await countLiveTokens(db, actor.id)) >= TOKEN_LIMITS.a_person) {
      throw new UserError('conflict', `You have ${TOKEN_LIMITS.a_person} tokens in use. Revoke one first; none was made.`)
    }
    const saved = await addToken(db, {
      userId: actor.id,
      name,
      ending: token.slice(-ENDING_CHARS),
      tokenHash: hashOfToken(token),
      scopes: [...new Set(scopes)],
      days,
    })
    const text = `token “${name}” made for ${scopes.join(', ')}, ${days} days`
    await addTrailLine(db, { actor, action: 'token made', subject: 'token', subjectId: saved.id, text })
    return { ...saved, token }
  })
}

/** @throws UserError `not_found`, also for another person's */
export async function revokeOwnToken(deps: Deps, actor: User, id: string): Promise<ApiToken> {
  return deps.source.transaction(async (db) => {
    const revoked = await revokeToken(db, actor.id, id)
    if (!revoked) throw new UserError('not_found', 'You have no such token in use.')
    const text = `token “${revoked.name}” revoked`
    await addTrailLine(db, { actor, action: 'token revoked', subject: 'token', subjectId: id, text })
    return revoked
  })
}

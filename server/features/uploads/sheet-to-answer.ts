import { UserError } from '../../../shared/errors.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { findSheetOwner } from '../../db/repositories/upload.ts'
import type { Deps } from '../../http/route.ts'

/**
 * The sheet a file answers, when it names one.
 * @throws UserError not_found, also for a demonstrator naming somebody else's
 */
export async function getSheetToAnswer(deps: Deps, actor: User, sheetId: string | undefined): Promise<string | null> {
  if (sheetId === undefined) return null
  const sheet = await findSheetOwner(deps.source.manager, sheetId)
  if (sheet && (actor.role !== 'demonstrator' || sheet.ownerId === actor.id)) return sheetId
  throw new UserError('not_found', 'There is no such sheet to answer.')
}

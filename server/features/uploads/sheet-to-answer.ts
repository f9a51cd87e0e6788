import { UserError } from '../../../shared/errors.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { findSheet } from '../../db/repositories/sheet.ts'
import { isSheetOf } from '../../db/repositories/sheet-people.ts'
import type { Deps } from '../../http/route.ts'

/**
 * The sheet a file answers, when it names one.
 * @throws UserError not_found, also for a demonstrator naming one they may not open
 */
export async function getSheetToAnswer(deps: Deps, actor: User, sheetId: string | undefined): Promise<string | null> {
  if (sheetId === undefined) return null
  const { manager } = deps.source
  const may = actor.role === 'demonstrator' ? await isSheetOf(manager, sheetId, actor.id) : await findSheet(manager, sheetId)
  if (may) return sheetId
  throw new UserError('not_found', 'There is no such sheet to answer.')
}

/** Taking a sheet in hand: a soft lease, so that two clerks do not work on one sheet without knowing. */
import { UserError } from '../../../shared/errors.ts'
import type { Sheet } from '../../../shared/schemas/sheet.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { holdSheet, releaseSheet } from '../../db/repositories/sheet.ts'
import type { Deps } from '../../http/route.ts'
import { getSheet } from './change-sheet.ts'

/** The desk renews it twice in this time; a closed browser frees the sheet after it. */
export const HOLD_S = 60

export async function takeInHand(deps: Deps, actor: User, id: string): Promise<Sheet> {
  const before = await getSheet(deps, actor, id)
  if (!(await holdSheet(deps.source.manager, id, actor.id, HOLD_S))) {
    throw new UserError('conflict', `${before.inHand?.name ?? 'Somebody'} has this sheet in hand. Take another, or wait.`)
  }
  return getSheet(deps, actor, id)
}

export async function letGo(deps: Deps, actor: User, id: string): Promise<void> {
  await releaseSheet(deps.source.manager, id, actor.id)
}

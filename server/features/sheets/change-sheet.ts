/** The one way to write on a sheet: on the version the person saw, in one transaction, with a line in the trail. */
import { UserError } from '../../../shared/errors.ts'
import type { Sheet } from '../../../shared/schemas/sheet.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { changesSince, findSheetDetail } from '../../db/desk/sheet-detail.ts'
import type { SheetEntity } from '../../db/entities/sheet.ts'
import { recheckSheet } from '../../db/intake/recheck-sheet.ts'
import { changeSheet, findSheet, noteOnSheet, type SheetChange } from '../../db/repositories/sheet.ts'
import { isSheetOf } from '../../db/repositories/sheet-people.ts'
import { addTrailLine, type TrailLine } from '../../db/repositories/trail.ts'
import type { Deps } from '../../http/route.ts'

export interface Change {
  /** What changes on the sheet's own row. */
  sheet?: SheetChange
  trail: Pick<TrailLine, 'action' | 'text' | 'key' | 'details'>
}

interface Write {
  deps: Deps
  actor: User
  id: string
  version: number
  /** States the act makes sense in. */
  from: readonly SheetEntity['state'][]
}

/**
 * Runs `act` on the locked sheet and counts its version up.
 * @throws UserError not_found, conflict (wrong state), changed (somebody wrote first: with what they changed)
 */
export async function writeOnSheet(write: Write, act: (db: Db, sheet: SheetEntity) => Promise<Change>): Promise<void> {
  const { deps, actor, id, version, from } = write
  await deps.source.transaction(async (db) => {
    if (!(await changeSheet(db, id, version, {}))) throw await staleOrMissing(db, id, version)
    const sheet = await findSheet(db, id)
    if (!sheet) throw missing()
    if (!from.includes(sheet.state)) throw new UserError('conflict', `This sheet is ${sheet.state}: nothing was changed.`)
    const change = await act(db, sheet)
    if (change.sheet) await noteOnSheet(db, id, change.sheet)
    const details = { ...change.trail.details, version: version + 1 }
    await addTrailLine(db, { ...change.trail, details, actor, subject: 'sheet', subjectId: id })
    await recheckSheet(db, id)
  })
}

async function staleOrMissing(db: Db, id: string, version: number): Promise<UserError> {
  if (!(await findSheet(db, id))) return missing()
  const issues = await changesSince(db, id, version)
  const what = issues.at(-1)?.message ?? 'It was changed while you had it open.'
  return new UserError('changed', `Not saved: ${what}. Look at it again, then decide.`, { issues })
}

const missing = () => new UserError('not_found', 'There is no such sheet.')

/** The sheet as this person may see it: a demonstrator theirs and those they sent a page of; another's does not exist for them. */
export async function getSheet(deps: Deps, actor: User, id: string): Promise<Sheet> {
  const { manager } = deps.source
  if (actor.role === 'demonstrator' && !(await isSheetOf(manager, id, actor.id))) throw missing()
  const found = await findSheetDetail(manager, id)
  if (!found) throw missing()
  return found
}

/** Leaving a run out of comparisons, with a reason, and taking that back. The record itself is untouched. */
import { UserError } from '../../../shared/errors.ts'
import type { Exclude, ExclusionLine } from '../../../shared/schemas/book-comparison.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { addExclusionLine, lastExclusionAct, listExclusionLines } from '../../db/repositories/exclusion.ts'
import { findRecord } from '../../db/repositories/record.ts'
import { addTrailLine } from '../../db/repositories/trail.ts'
import type { Deps } from '../../http/route.ts'

const MOST_LINES = 500

export const exclusionLog = async (deps: Deps): Promise<{ lines: ExclusionLine[] }> => ({
  lines: await listExclusionLines(deps.source.manager, MOST_LINES),
})

export const leaveOut = (deps: Deps, actor: User, exclude: Exclude) => write(deps, actor, exclude, 'left out')
export const takeBack = (deps: Deps, actor: User, exclude: Exclude) => write(deps, actor, exclude, 'taken back')

async function write(deps: Deps, actor: User, { number, reason }: Exclude, act: ExclusionLine['act']) {
  await deps.source.transaction(async (db) => {
    const record = await findRecord(db, number)
    if (!record) throw new UserError('not_found', `There is no record ${number}.`)
    const isOut = (await lastExclusionAct(db, number)) === 'left out'
    if (isOut === (act === 'left out'))
      throw new UserError('conflict', isOut ? `Record ${number} is left out already.` : `Record ${number} is not left out.`)
    await addExclusionLine(db, { number, act, reason, byId: actor.id })
    await addTrailLine(db, {
      actor,
      action: act,
      subject: 'sheet',
      subjectId: record.sheetId,
      text:
        act === 'left out'
          ? `record ${number} left out of comparisons: “${reason}”`
          : `record ${number} back in comparisons: “${reason}”`,
      details: { record: number },
    })
  })
  return exclusionLog(deps)
}

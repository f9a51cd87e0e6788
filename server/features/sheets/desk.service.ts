/** What ends a sheet's stay at the desk, other than entering: send back, set aside, take up again. */

import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { SendBack, SetAside, Sheet } from '../../../shared/schemas/sheet.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { findUser } from '../../db/repositories/user.ts'
import type { Deps } from '../../http/route.ts'
import { queueMail } from '../mails/mails.service.ts'
import { getSheet, writeOnSheet } from './change-sheet.ts'

const LET_GO = { heldBy: null, heldSince: null, heldUntil: null }

export async function sendBack(deps: Deps, actor: User, id: string, input: SendBack): Promise<Sheet> {
  await writeOnSheet(
    { deps, actor, id, version: input.version, from: ['waiting', 'settled', 'challenged', 'unreadable'] },
    async (db, sheet) => {
      const owner = sheet.ownerId ? await findUser(db, sheet.ownerId) : null
      const name = sheet.code ? formatSheetCode(sheet.code) : 'without a code'
      if (owner) {
        await queueMail(deps, db, {
          to: owner.email,
          subject: `Sheet ${name} comes back to you`,
          text: `${input.reason}\n\nAnswer with a new picture or with what you know, at ${deps.settings.publicUrl}/sheets/${id}\nThe first picture is kept.\n\n${actor.name}`,
        })
      }
      const text = `sent back${owner ? ` to ${owner.name}` : ''}: “${input.reason}”`
      return {
        sheet: { ...LET_GO, state: 'sent back', sentBackReason: input.reason, answered: false },
        trail: { action: 'sent back', text, details: { cells: input.cells } },
      }
    },
  )
  return getSheet(deps, actor, id)
}

export async function setAside(deps: Deps, actor: User, id: string, input: SetAside): Promise<Sheet> {
  await writeOnSheet(
    { deps, actor, id, version: input.version, from: ['waiting', 'settled', 'unreadable', 'sent back'] },
    async () => ({
      sheet: { ...LET_GO, state: 'set aside', reason: input.reason },
      trail: { action: 'set aside', text: `set aside: “${input.reason}”` },
    }),
  )
  return getSheet(deps, actor, id)
}

export async function takeUp(deps: Deps, actor: User, id: string, version: number): Promise<Sheet> {
  await writeOnSheet({ deps, actor, id, version, from: ['set aside', 'sent back'] }, async (_db, sheet) => ({
    sheet: { state: sheet.layoutKey ? 'waiting' : 'unreadable', reason: null },
    trail: { action: 'taken up', text: `taken up again; it was ${sheet.state}` },
  }))
  return getSheet(deps, actor, id)
}

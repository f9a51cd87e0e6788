/** What ends a sheet's stay at the desk, other than entering: send back, set aside, take up again. */

import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { SendBack, SetAside, Sheet } from '../../../shared/schemas/sheet.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import type { SheetEntity } from '../../db/entities/sheet.ts'
import { senderIdsOf } from '../../db/repositories/sheet-people.ts'
import { findUser } from '../../db/repositories/user.ts'
import type { Deps } from '../../http/route.ts'
import { queueMail } from '../mails/mails.service.ts'
import { getSheet, writeOnSheet } from './change-sheet.ts'

const LET_GO = { heldBy: null, heldSince: null, heldUntil: null }

export async function sendBack(deps: Deps, actor: User, id: string, input: SendBack): Promise<Sheet> {
  await writeOnSheet(
    { deps, actor, id, version: input.version, from: ['waiting', 'settled', 'challenged', 'unreadable'] },
    async (db, sheet) => {
      const people = await peopleToAsk(db, sheet)
      const name = sheet.code ? formatSheetCode(sheet.code) : 'without a code'
      for (const { email } of people) {
        await queueMail(deps, db, {
          to: email,
          subject: `Sheet ${name} comes back to you`,
          text: `${input.reason}\n\nAnswer with a new picture or with what you know, at ${deps.settings.publicUrl}/sheets/${id}\nThe first picture is kept.\n\n${actor.name}`,
        })
      }
      const to = people.map((person) => person.name).join(' and ')
      const text = `sent back${to ? ` to ${to}` : ''}: “${input.reason}”`
      return {
        sheet: { ...LET_GO, state: 'sent back', sentBackReason: input.reason, answered: false },
        trail: { action: 'sent back', text, details: { cells: input.cells } },
      }
    },
  )
  return getSheet(deps, actor, id)
}

/** Whose sheet it is, and who sent its latest page: either may hold the paper. */
async function peopleToAsk(db: Db, sheet: SheetEntity): Promise<User[]> {
  const [sender] = await senderIdsOf(db, sheet.id)
  const ids = new Set([sheet.ownerId, sender].filter((id) => typeof id === 'string'))
  const people = await Promise.all([...ids].map((id) => findUser(db, id)))
  return people.filter((person) => person !== null)
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

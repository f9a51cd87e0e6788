/** The leaf of a record: to look at, and by mail to the farmer, once a version and only with consent. */
import { UserError } from '../../../shared/errors.ts'
import type { LeafStatus } from '../../../shared/schemas/leaf.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { findLeaf, type Leaf } from '../../db/desk/leaf-content.ts'
import { sendJob } from '../../db/queue.ts'
import { addLeaf, listLeaves } from '../../db/repositories/leaf.ts'
import { addMail } from '../../db/repositories/mail.ts'
import { findSheet } from '../../db/repositories/sheet.ts'
import type { Deps } from '../../http/route.ts'
import { printLeaf } from '../../print/leaf-pdf.ts'
import { writeTrail } from '../trail/trail.service.ts'

/** @throws UserError `not_found`, also for another demonstrator's record */
async function ownLeaf(db: Db, actor: User, number: number, version?: number): Promise<Leaf> {
  const leaf = await findLeaf(db, number, version)
  const sheet = leaf && (await findSheet(db, leaf.sheetId))
  if (!leaf || !sheet || (actor.role === 'demonstrator' && sheet.ownerId !== actor.id)) {
    throw new UserError('not_found', 'There is no such record.')
  }
  return leaf
}

/** The page itself. The farmer's name is for those who deal with the farmer. */
export async function leafPdf(deps: Deps, actor: User, number: number, version?: number): Promise<Buffer> {
  const { content } = await ownLeaf(deps.source.manager, actor, number, version)
  return printLeaf(actor.role === 'analyst' ? { ...content, farmerName: null } : content)
}

const NO_ADDRESS = 'The plan has no e-mail address for the farmer: add it there first.'

/** Why the leaf cannot go out by mail; null when it can. */
function obstacle(leaf: Leaf, sent: LeafStatus['sent']): string | null {
  const { state, version } = leaf.content.row
  if (state === 'challenged')
    return 'The record is challenged and back at the desk. Its leaf can go out when it is entered again.'
  if (!leaf.farmer) return 'The plan names no farmer, or the farmer withdrew consent.'
  if (!leaf.mayBeContacted) return 'On the sheet the farmer did not agree to be contacted.'
  if (!leaf.farmer.email) return NO_ADDRESS
  if (sent.some((s) => s.version === version && s.state !== 'failed')) return 'The leaf of this version has gone out already.'
  return null
}

export async function leafStatus(deps: Deps, actor: User, number: number): Promise<LeafStatus> {
  const db = deps.source.manager
  const leaf = await ownLeaf(db, actor, number)
  const sent = await listLeaves(db, number)
  const why = obstacle(leaf, sent)
  return { why, planId: why === NO_ADDRESS ? leaf.demonstrationId : null, sent }
}

/** @throws UserError `conflict` with the reason why it cannot go out */
export async function sendLeaf(deps: Deps, actor: User, number: number): Promise<LeafStatus> {
  await deps.source.transaction(async (db) => {
    const leaf = await ownLeaf(db, actor, number)
    const why = obstacle(leaf, await listLeaves(db, number))
    if (why || !leaf.farmer) throw new UserError('conflict', `${why} Nothing was sent.`)
    const { version } = leaf.content.row
    const mailId = await addMail(db, mailOf(leaf, leaf.farmer))
    if (!(await addLeaf(db, { recordNumber: number, recordVersion: version, mailId, sentBy: actor.id }))) {
      throw new UserError('conflict', 'The leaf of this version has gone out already. Nothing was sent.')
    }
    await sendJob(deps.boss, db, 'mail-send', { mailId })
    const text = `leaf of record ${number}, version ${version}, handed to the mail for the farmer`
    await writeTrail(db, {
      actor,
      action: 'send leaf',
      subject: 'sheet',
      subjectId: leaf.sheetId,
      text,
      details: { record: number },
    })
  })
  return leafStatus(deps, actor, number)
}

function mailOf({ content }: Leaf, farmer: { name: string; email: string }) {
  const { row, contact } = content
  const text = [
    `${farmer.name},`,
    '',
    `the page with what was measured on your field is attached: ${row.tractor.name} with ${row.implement.name}.`,
    'It holds for that field on that day.',
    '',
    `If you withdraw your consent, tell ${contact.name}${contact.email ? `, ${contact.email}` : ''}: name, phone, e-mail and signature are then erased.`,
  ].join('\n')
  return { to: farmer.email, subject: `What was measured: ${row.tractor.name}, ${row.place.name}`, text }
}

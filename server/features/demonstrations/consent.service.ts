import { createHash, randomBytes } from 'node:crypto'
import { UserError } from '../../../shared/errors.ts'
import type { Demonstration } from '../../../shared/schemas/demonstration.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { changeDemonstration, findDemonstrationRow } from '../../db/repositories/demonstration.ts'
import { findFarmer, removeFarmer } from '../../db/repositories/farmer.ts'
import { hasOpenPages, listKeptFiles } from '../../db/repositories/kept-picture.ts'
import { eraseLeafMails } from '../../db/repositories/leaf.ts'
import type { Deps } from '../../http/route.ts'
import { blankPictures } from '../../print/blank-pictures.ts'
import { writeTrail } from '../trail/trail.service.ts'
import { checkMayChange, getDemonstration } from './get-demonstration.ts'

/**
 * Erases the farmer of a demonstration: name, phone and e-mail, and their place in every stored picture. The readings stay.
 * The trail keeps a salted hash, by which somebody who knows name and phone can prove that it was they.
 * @throws UserError `not_found` (also for another demonstrator's), `conflict` when it was done before
 */
export async function withdrawConsent(deps: Deps, actor: User, id: string, reason: string): Promise<Demonstration> {
  const db = deps.source.manager
  await checkMayChange(db, actor, id)
  const row = await findDemonstrationRow(db, id)
  const farmer = row?.farmerId ? await findFarmer(db, row.farmerId) : null
  if (!row?.farmerId || !farmer) throw new UserError('conflict', 'The farmer of this demonstration was erased before.')
  const { farmerId, version } = row
  await checkAllRead(db, id)
  const blanked = await blankPictures(deps, id)
  const salt = randomBytes(16).toString('hex')
  const hash = createHash('sha256').update(`${salt}|${farmer.name}|${farmer.phone}`).digest('hex')
  await deps.source.transaction(async (tx) => {
    if (!(await changeDemonstration(tx, { id, version }, { farmerId: null }))) {
      throw new UserError(
        'changed',
        'The plan was changed at the same moment. Pictures are blanked; do it once more to erase the name.',
      )
    }
    await removeFarmer(tx, farmerId)
    await eraseLeafMails(tx, id)
    await blanked.write(tx)
    const { pages, replaced, removed } = blanked
    const text = [
      `Consent withdrawn (“${reason}”): name, phone and e-mail erased; pictures blanked: ${pages}, not placed and removed: ${removed}`,
      `originals replaced by their blanked pages: ${replaced}`,
    ].join('; ')
    const details = { farmer: { salt, sha256: hash }, pages, replaced, removed }
    await writeTrail(tx, { actor, action: 'withdraw consent', subject: 'demonstration', subjectId: id, text, details })
  })
  for (const key of blanked.stale) await deps.files.remove(key)
  return getDemonstration(db, actor, id)
}

/** @throws UserError `conflict` while a file of its sheets is being read: its pages are read from the original */
async function checkAllRead(db: Db, id: string): Promise<void> {
  for (const file of await listKeptFiles(db, { demonstrationId: id, uploadId: null })) {
    if (!(await hasOpenPages(db, file.id))) continue
    throw new UserError('conflict', 'A file of these sheets is being read. Nothing was erased. Try again in a minute.')
  }
}

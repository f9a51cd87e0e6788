import { UserError } from '../../../shared/errors.ts'
import type { Demonstration } from '../../../shared/schemas/demonstration.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { findDemonstrationRow } from '../../db/repositories/demonstration.ts'
import { findFarmer } from '../../db/repositories/farmer.ts'
import { getRegisterRow } from '../../db/repositories/register.ts'
import { listTrials } from '../../db/repositories/run.ts'
import { findUser } from '../../db/repositories/user.ts'

const nothingThere = () => new UserError('not_found', 'There is no such demonstration.')

/**
 * A day as planned. A demonstrator sees their own; the farmer's name is for those who deal with the farmer.
 * @throws UserError `not_found`, also for another demonstrator's
 */
export async function getDemonstration(db: Db, actor: User, id: string): Promise<Demonstration> {
  const row = await findDemonstrationRow(db, id)
  if (!row || !maySee(actor, row.demonstratorId)) throw nothingThere()
  const place = await getRegisterRow(db, 'places', row.placeId)
  const demonstrator = await findUser(db, row.demonstratorId)
  if (!('district' in place) || !demonstrator) throw new Error(`demonstration ${id} names a row that is gone`)
  const farmer = row.farmerId && actor.role !== 'analyst' ? await findFarmer(db, row.farmerId) : null
  const trials = await listTrials(db, id)
  return {
    id,
    heldOn: row.heldOn,
    place: { id: place.id, number: place.number, name: place.name, district: place.district },
    demonstrator: { id: demonstrator.id, number: demonstrator.number, name: demonstrator.name },
    driver: row.driver,
    farmer,
    trials: trials.map(({ position: _, ...trial }) => trial),
    version: row.version,
  }
}

/** Another's demonstration does not exist for a demonstrator. */
export const maySee = (actor: User, demonstratorId: string) => actor.role !== 'demonstrator' || actor.id === demonstratorId

/** @throws UserError `not_found` or `not_allowed` */
export async function checkMayChange(db: Db, actor: User, id: string): Promise<void> {
  const row = await findDemonstrationRow(db, id)
  if (!row || !maySee(actor, row.demonstratorId)) throw nothingThere()
}

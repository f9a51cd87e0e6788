import { UserError } from '../../../shared/errors.ts'
import type { Demonstration, SaveDemonstration } from '../../../shared/schemas/demonstration.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import { isForeignKeyViolation } from '../../db/driver-errors.ts'
import { addDemonstration, changeDemonstration, findDemonstrationRow } from '../../db/repositories/demonstration.ts'
import { addFarmer, changeFarmer } from '../../db/repositories/farmer.ts'
import { giveSheetsTo } from '../../db/repositories/run.ts'
import { findLastActor } from '../../db/repositories/trail.ts'
import { findUser } from '../../db/repositories/user.ts'
import type { Deps } from '../../http/route.ts'
import { writeTrail } from '../trail/trail.service.ts'
import { checkMayChange, getDemonstration } from './get-demonstration.ts'
import { planTrials } from './plan-trials.ts'

/**
 * Plans a day; every run gets a printed sheet with a code of its own.
 * @throws UserError `not_allowed` for another's, `invalid` for something a register does not hold
 */
export async function planDemonstration(deps: Deps, actor: User, input: SaveDemonstration): Promise<Demonstration> {
  return knownRows(
    deps.source.transaction(async (db) => {
      await checkDemonstrator(db, actor, input.demonstratorId)
      const { heldOn, placeId, demonstratorId, driver } = input
      const farmerId = await addFarmer(db, input.farmer)
      const id = await addDemonstration(db, { heldOn, placeId, demonstratorId, driver, farmerId })
      await planTrials(db, id, demonstratorId, input.trials)
      const planned = await getDemonstration(db, actor, id)
      await note(db, actor, 'plan', planned)
      return planned
    }),
  )
}

/** @throws UserError `not_found`, `not_allowed`, `changed`, or `conflict` when sheets that arrived stand against it */
export async function replanDemonstration(
  deps: Deps,
  actor: User,
  id: string,
  { version, ...input }: SaveDemonstration & { version: number },
): Promise<Demonstration> {
  return knownRows(
    deps.source.transaction(async (db) => {
      await checkMayChange(db, actor, id)
      await checkDemonstrator(db, actor, input.demonstratorId)
      const { heldOn, placeId, demonstratorId, driver } = input
      if (!(await changeDemonstration(db, { id, version }, { heldOn, placeId, demonstratorId, driver }))) {
        throw await changedMeanwhile(db, id)
      }
      const row = await findDemonstrationRow(db, id)
      // Once erased, a farmer's name does not come back by saving the plan.
      if (row?.farmerId) await changeFarmer(db, row.farmerId, input.farmer)
      await planTrials(db, id, demonstratorId, input.trials)
      await giveSheetsTo(db, id, demonstratorId)
      const planned = await getDemonstration(db, actor, id)
      await note(db, actor, 'change plan', planned)
      return planned
    }),
  )
}

async function checkDemonstrator(db: Db, actor: User, demonstratorId: string): Promise<void> {
  if (actor.role !== 'admin' && actor.id !== demonstratorId) {
    throw new UserError('not_allowed', 'A demonstrator plans their own demonstrations; an admin plans for anybody.')
  }
  const demonstrator = await findUser(db, demonstratorId)
  if (!demonstrator?.active) throw unknown('demonstratorId', 'Nobody with this id can hold a demonstration.')
}

/** The trail names the day and what it holds, not the farmer. */
async function note(db: Db, actor: User, action: string, planned: Demonstration): Promise<void> {
  const runs = planned.trials.reduce((sum, trial) => sum + trial.runs.length, 0)
  await writeTrail(db, {
    actor,
    action,
    subject: 'demonstration',
    subjectId: planned.id,
    text: `${planned.heldOn}, ${planned.place.name}; trials: ${planned.trials.length}, runs: ${runs}`,
    details: {
      trials: planned.trials.map(({ plot, tractor, implement, kit, runs: r }) => ({
        plot,
        tractor,
        implement,
        kit,
        runs: r.length,
      })),
    },
  })
}

async function changedMeanwhile(db: Db, id: string): Promise<UserError> {
  const who = (await findLastActor(db, id)) ?? 'Somebody'
  return new UserError('changed', `${who} changed this plan after you loaded it. Yours was not saved.`)
}

const unknown = (path: string, message: string) =>
  new UserError('invalid', `${message} Nothing was saved.`, { issues: [{ path, message }] })

async function knownRows<T>(work: Promise<T>): Promise<T> {
  try {
    return await work
  } catch (cause) {
    if (!isForeignKeyViolation(cause)) throw cause
    throw new UserError(
      'invalid',
      'The plan names a place, tractor, implement or kit that no register holds. Nothing was saved.',
      { cause },
    )
  }
}

/** Brings trials and runs in line with a saved plan: what stands at a position is changed, what is more is added or taken out. */
import { randomInt } from 'node:crypto'
import { UserError } from '../../../shared/errors.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import { formatSheetCode, makeSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { SaveTrial } from '../../../shared/schemas/demonstration.ts'
import type { Db } from '../../db/database.ts'
import { addTrial, changeTrial, removeTrial } from '../../db/repositories/demonstration.ts'
import { addRun, listTrials, type PlannedTrial, removeRun } from '../../db/repositories/run.ts'

/** The sheet that is printed for planned runs. */
const LAYOUT = 'tillage'

export const freshCode = () => makeSheetCode((below) => randomInt(below))

/** @throws UserError `conflict` when a sheet that has arrived would lose its run, or its trial another machine */
export async function planTrials(db: Db, demonstrationId: string, ownerId: string, wanted: readonly SaveTrial[]): Promise<void> {
  const standing = await listTrials(db, demonstrationId)
  for (const trial of standing.slice(wanted.length)) {
    await removeRuns(db, trial, 0)
    await removeTrial(db, trial.id)
  }
  for (const [index, trial] of wanted.entries()) {
    const found = standing[index]
    if (found) await adapt(db, found, trial, ownerId)
    else await addRuns(db, await addTrial(db, demonstrationId, index, trial), { from: 0, to: trial.runs, ownerId })
  }
}

async function adapt(db: Db, found: PlannedTrial, wanted: SaveTrial, ownerId: string): Promise<void> {
  const same =
    found.tractor.id === wanted.tractorId &&
    found.implement.id === wanted.implementId &&
    found.kit.id === wanted.kitId &&
    found.plot === wanted.plot
  if (!same) {
    const arrived = found.runs.find((run) => run.sheetState !== null && run.sheetState !== 'printed')
    if (arrived) throw hasArrived(arrived.sheetCode, 'its trial cannot get another tractor, implement, kit or plot')
    await changeTrial(db, found.id, wanted)
  }
  await removeRuns(db, found, wanted.runs)
  await addRuns(db, found.id, { from: found.runs.length, to: wanted.runs, ownerId })
}

async function addRuns(
  db: Db,
  trialId: string,
  { from, to, ownerId }: { from: number; to: number; ownerId: string },
): Promise<void> {
  const layout = findLayout(LAYOUT)
  if (!layout) throw new Error(`there is no layout ${LAYOUT}`)
  for (let number = from + 1; number <= to; number++) {
    const sheet = { code: freshCode(), layoutKey: layout.key, layoutVersion: layout.version, ownerId }
    await addRun(db, trialId, number, sheet)
  }
}

async function removeRuns(db: Db, trial: PlannedTrial, keep: number): Promise<void> {
  for (const run of trial.runs.slice(keep)) {
    if (!(await removeRun(db, run.id))) throw hasArrived(run.sheetCode, 'its run cannot be taken out of the plan')
  }
}

function hasArrived(code: string | null, so: string): UserError {
  const named = code ? `Sheet ${formatSheetCode(code)}` : 'A sheet'
  return new UserError('conflict', `${named} has arrived: ${so}. Nothing was saved.`)
}

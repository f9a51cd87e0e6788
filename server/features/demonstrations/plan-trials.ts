/** Brings trials and runs in line with a saved plan: what stands at a position is changed, what is more is added or taken out. */
import { randomInt } from 'node:crypto'
import { UserError } from '../../../shared/errors.ts'
import type { Layout } from '../../../shared/layouts/layout.ts'
import { findLayout, LAYOUTS, USUAL_LAYOUT } from '../../../shared/layouts/registry.ts'
import { formatSheetCode, makeSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { SaveTrial } from '../../../shared/schemas/demonstration.ts'
import type { Db } from '../../db/database.ts'
import { addTrial, changeTrial, removeTrial } from '../../db/repositories/demonstration.ts'
import { addRun, listTrials, type PlannedTrial, removeRun } from '../../db/repositories/run.ts'

export const freshCode = () => makeSheetCode((below) => randomInt(below))

/** @throws UserError `invalid` for a sheet there is none of; `conflict` when a sheet that has arrived would lose its run, or its trial another machine or sheet */
export async function planTrials(db: Db, demonstrationId: string, ownerId: string, wanted: readonly SaveTrial[]): Promise<void> {
  const standing = await listTrials(db, demonstrationId)
  for (const trial of standing.slice(wanted.length)) {
    await removeRuns(db, trial, 0)
    await removeTrial(db, trial.id)
  }
  for (const [index, trial] of wanted.entries()) {
    const found = standing[index]
    const layout = layoutOf(trial, index)
    if (found) await adapt(db, found, trial, { layout, ownerId })
    else await addRuns(db, await addTrial(db, demonstrationId, index, trial), { from: 0, to: trial.runs, layout, ownerId })
  }
}

interface SheetsFor {
  layout: Layout
  ownerId: string
}

function layoutOf(trial: SaveTrial, index: number): Layout {
  const layout = findLayout(trial.layout ?? USUAL_LAYOUT)
  if (layout) return layout
  const message = `There is no sheet "${trial.layout}": choose one of ${LAYOUTS.map((l) => l.key).join(', ')}.`
  throw new UserError('invalid', `${message} Nothing was saved.`, { issues: [{ path: `trials.${index}.layout`, message }] })
}

async function adapt(db: Db, found: PlannedTrial, wanted: SaveTrial, { layout, ownerId }: SheetsFor): Promise<void> {
  const sameSheet = found.layout === layout.key
  const same =
    found.tractor.id === wanted.tractorId &&
    found.implement.id === wanted.implementId &&
    found.kit.id === wanted.kitId &&
    found.plot === wanted.plot &&
    sameSheet
  if (!same) {
    const arrived = found.runs.find((run) => run.sheetState !== null && run.sheetState !== 'printed')
    if (arrived) throw hasArrived(arrived.sheetCode, 'its trial cannot get another tractor, implement, kit, plot or layout')
    await changeTrial(db, found.id, wanted)
  }
  // What was printed is on the other layout: those sheets are taken out, and new ones have new codes.
  await removeRuns(db, found, sameSheet ? wanted.runs : 0)
  await addRuns(db, found.id, { from: sameSheet ? found.runs.length : 0, to: wanted.runs, layout, ownerId })
}

async function addRuns(
  db: Db,
  trialId: string,
  { from, to, layout, ownerId }: SheetsFor & { from: number; to: number },
): Promise<void> {
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

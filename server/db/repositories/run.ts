/** Runs of a trial, each with the sheet that was printed for it. */
import type { Trial } from '../../../shared/schemas/demonstration.ts'
import type { Db } from '../database.ts'
import { RunEntity } from '../entities/plan.ts'
import { SheetEntity } from '../entities/sheet.ts'

/** A trial as planned, with the ids a plan is compared by. */
export interface PlannedTrial extends Trial {
  position: number
}

const REFERENCE = (alias: string) => `json_build_object('id', ${alias}.id, 'number', ${alias}.number, 'name', ${alias}.name)`

/** In their order, with runs, sheets and record numbers. */
export async function listTrials(db: Db, demonstrationId: string): Promise<PlannedTrial[]> {
  return db.query(
    `SELECT t.id, t.position, t.plot, ${REFERENCE('tr')} AS tractor, ${REFERENCE('i')} AS implement, ${REFERENCE('k')} AS kit,
       (SELECT s.layout_key FROM runs r JOIN sheets s ON s.run_id = r.id AND s.planned
         WHERE r.trial_id = t.id ORDER BY r.number, s.created_at LIMIT 1) AS layout,
       coalesce((SELECT json_agg(json_build_object('id', r.id, 'number', r.number, 'sheetId', s.id, 'sheetCode', s.code,
           'sheetState', s.state, 'recordNumber', (SELECT max(e.number) FROM records e WHERE e.sheet_id = s.id)) ORDER BY r.number)
         FROM runs r LEFT JOIN LATERAL (SELECT * FROM sheets WHERE run_id = r.id ORDER BY created_at LIMIT 1) s ON true
         WHERE r.trial_id = t.id), '[]') AS runs
     FROM trials t JOIN tractors tr ON tr.id = t.tractor_id JOIN implements i ON i.id = t.implement_id JOIN kits k ON k.id = t.kit_id
     WHERE t.demonstration_id = $1 ORDER BY t.position`,
    [demonstrationId],
  )
}

export interface PrintedSheet {
  code: string
  layoutKey: string
  layoutVersion: number
  ownerId: string
}

/** A run and the sheet it will be written on. */
export async function addRun(db: Db, trialId: string, number: number, sheet: PrintedSheet): Promise<void> {
  const run = await db.save(db.create(RunEntity, { trialId, number }))
  await db.insert(SheetEntity, { ...sheet, runId: run.id, planned: true, state: 'printed' })
}

/**
 * Takes a run out of the plan, with its sheet if nothing has come in for it.
 * @returns false when the sheet has arrived: then nothing is removed
 */
export async function removeRun(db: Db, runId: string): Promise<boolean> {
  await db.delete(SheetEntity, { runId, state: 'printed' })
  if (await db.existsBy(SheetEntity, { runId })) return false
  await db.delete(RunEntity, { id: runId })
  return true
}

/** Sheets still out belong to whoever holds the demonstration now. */
export async function giveSheetsTo(db: Db, demonstrationId: string, ownerId: string): Promise<void> {
  await db.query(
    `UPDATE sheets SET owner_id = $2 WHERE state = 'printed' AND run_id IN
       (SELECT r.id FROM runs r JOIN trials t ON t.id = r.trial_id WHERE t.demonstration_id = $1)`,
    [demonstrationId, ownerId],
  )
}

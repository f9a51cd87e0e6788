/** What the plan knows of a run, as the typed block prints it and as readings. */
import type { Db } from '../database.ts'

export interface RunPlan {
  runId: string
  runNumber: number
  runs: number
  heldOn: string
  plot: string
  demonstratorId: string
  demonstratorNumber: number
  placeNumber: number
  tractorNumber: number
  implementNumber: number
  kitNumber: number
}

export async function planOfRun(db: Db, runId: string): Promise<RunPlan | null> {
  const rows: RunPlan[] = await db.query(
    `SELECT r.id AS "runId", r.number AS "runNumber", (SELECT count(*)::int FROM runs o WHERE o.trial_id = t.id) AS runs,
       d.held_on AS "heldOn", t.plot, u.id AS "demonstratorId", u.number AS "demonstratorNumber", p.number AS "placeNumber",
       tr.number AS "tractorNumber", i.number AS "implementNumber", k.number AS "kitNumber"
     FROM runs r JOIN trials t ON t.id = r.trial_id JOIN demonstrations d ON d.id = t.demonstration_id
       JOIN users u ON u.id = d.demonstrator_id JOIN places p ON p.id = d.place_id JOIN tractors tr ON tr.id = t.tractor_id
       JOIN implements i ON i.id = t.implement_id JOIN kits k ON k.id = t.kit_id
     WHERE r.id = $1`,
    [runId],
  )
  return rows[0] ?? null
}

/** The readings a planned sheet takes from its plan. */
export const planValues = (plan: RunPlan): Record<string, string | number> => ({
  trial_date: plan.heldOn,
  demonstrator_id: plan.demonstratorNumber,
  place_id: plan.placeNumber,
  tractor_id: plan.tractorNumber,
  implement_id: plan.implementNumber,
  kit_id: plan.kitNumber,
})

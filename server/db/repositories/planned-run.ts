/** The run a sheet was planned for, and whose field it is. */
import type { Db } from '../database.ts'

export interface PlannedRun {
  plot: string
  number: number
  demonstrationId: string
  /** null once consent was withdrawn. */
  farmerId: string | null
}

/** null for an unplanned sheet. */
export async function findPlannedRun(db: Db, sheetId: string): Promise<PlannedRun | null> {
  const rows: PlannedRun[] = await db.query(
    `SELECT t.plot, r.number, d.id AS "demonstrationId", d.farmer_id AS "farmerId"
     FROM sheets s JOIN runs r ON r.id = s.run_id JOIN trials t ON t.id = r.trial_id JOIN demonstrations d ON d.id = t.demonstration_id
     WHERE s.id = $1`,
    [sheetId],
  )
  return rows[0] ?? null
}

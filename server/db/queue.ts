/** pg-boss as this product uses it: our queues only, sent inside the transaction that writes the row. */
import PgBoss from 'pg-boss'
import { JOBS, type JobName, type JobPayload } from '../../shared/jobs.ts'
import type { Db } from './database.ts'

/**
 * A page takes about a second; a job still running after 30 s is lost, and the maintenance tick gives it to another worker.
 * Together with the tick that keeps a killed worker's page away for at most 45 s. After three deaths the page is given up.
 */
export const QUEUE_OPTIONS = { retryLimit: 2, retryDelay: 1, expireInSeconds: 30, retentionDays: 14 } as const
export const MAINTENANCE_S = 10

export function createBoss(url: string, options: { owner?: boolean } = {}): PgBoss {
  return new PgBoss({
    connectionString: url,
    migrate: options.owner ?? false,
    supervise: !options.owner,
    schedule: false,
    maintenanceIntervalSeconds: MAINTENANCE_S,
    max: 4,
  })
}

/** Writes the job in the caller's transaction: row and job stand or fall together. */
export async function sendJob<N extends JobName>(boss: PgBoss, db: Db, name: N, payload: JobPayload<N>): Promise<void> {
  const runner = db.queryRunner
  if (!runner) throw new Error(`${name} must be sent inside a transaction`)
  const id = await boss.send(name, JOBS[name].parse(payload), {
    db: { executeSql: async (text: string, values: unknown[]) => ({ rows: (await runner.query(text, values, true)).records }) },
  })
  if (!id) throw new Error(`the queue did not take ${name}: is the database migrated?`)
}

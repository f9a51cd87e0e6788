/** pg-boss as this product uses it: our queues only, sent inside the transaction that writes the row. */
import PgBoss from 'pg-boss'
import { JOBS, type JobName, type JobPayload } from '../../shared/jobs.ts'
import type { Db } from './database.ts'

/**
 * A page takes about a second; a job still running after 30 s is lost, and the maintenance tick gives it to another worker.
 * After three deaths the page is given up. A mail waits for its server: nine attempts, the last four to nine hours after the first.
 */
export const QUEUE_OPTIONS = { retryLimit: 2, retryDelay: 1, expireInSeconds: 30, retentionDays: 14 } as const
const MAIL_OPTIONS = { ...QUEUE_OPTIONS, retryLimit: 8, retryDelay: 60, retryBackoff: true } as const
/** A receiver may be down over a weekend: fourteen attempts, the last three to six days after the first. */
const WEBHOOK_OPTIONS = { ...QUEUE_OPTIONS, retryLimit: 13, retryDelay: 30, retryBackoff: true } as const
const OWN_OPTIONS: Partial<Record<JobName, typeof MAIL_OPTIONS | typeof WEBHOOK_OPTIONS>> = {
  'mail-send': MAIL_OPTIONS,
  'webhook-send': WEBHOOK_OPTIONS,
}
export const queueOptions = (name: JobName) => OWN_OPTIONS[name] ?? QUEUE_OPTIONS
/** What must be said or done when a job was given up is tried again after one minute, two, four … for five days. */
export const FAILED_OPTIONS = { retryLimit: 12, retryDelay: 60, retryBackoff: true, retentionDays: 14 } as const
/** Where a job goes whose attempts are used up: its handler says so to whoever waits. */
export const failedQueue = <N extends JobName>(name: N) => `${name}-failed` as const

/**
 * A tick that comes a moment early is skipped by the queue, so the next one counts: a killed worker's page is away for at most
 * expiry + 2 ticks + retry delay + one look at the queue (0.5 s), which must stay within 45 s.
 */
export const MAINTENANCE_S = 5

export function createBoss(url: string, options: { owner?: boolean; maintenance_s?: number } = {}): PgBoss {
  return new PgBoss({
    connectionString: url,
    migrate: options.owner ?? false,
    supervise: !options.owner,
    schedule: false,
    maintenanceIntervalSeconds: options.maintenance_s ?? MAINTENANCE_S,
    max: 4,
  })
}

/** The caller's transaction, as the queue wants to be given it. */
function within(db: Db, name: JobName) {
  const runner = db.queryRunner
  if (!runner) throw new Error(`${name} must be sent inside a transaction`)
  return { executeSql: async (text: string, values: unknown[]) => ({ rows: (await runner.query(text, values, true)).records }) }
}

/** A photo goes before the pages of scans and spreadsheets: somebody stands in a field and waits to hear whether it can be read. */
export const PHOTO_FIRST = 10

/**
 * Writes the job in the caller's transaction: row and job stand or fall together.
 * @param priority higher goes first; 0 unless told
 */
export async function sendJob<N extends JobName>(
  boss: PgBoss,
  db: Db,
  name: N,
  payload: JobPayload<N>,
  priority = 0,
): Promise<void> {
  const id = await boss.send(name, JOBS[name].parse(payload), { db: within(db, name), priority })
  if (!id) throw new Error(`the queue did not take ${name}: is the database migrated?`)
}

/** Many at once: one by one, the pages of a full season's spreadsheet would take longer than a job may. */
export async function sendJobs<N extends JobName>(
  boss: PgBoss,
  db: Db,
  name: N,
  payloads: readonly JobPayload<N>[],
): Promise<void> {
  await boss.insert(
    payloads.map((payload) => ({ name, data: JOBS[name].parse(payload) })),
    { db: within(db, name) },
  )
}

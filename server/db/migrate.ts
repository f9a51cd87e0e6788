/** Brings a database up to date: tables, the queue's own schema, and what the application's role may do. */
import { JOBS, type JobName } from '../../shared/jobs.ts'
import { APP_ROLE } from '../postgres/roles.ts'
import { createDataSource } from './database.ts'
import { createBoss, FAILED_OPTIONS, failedQueue, queueOptions } from './queue.ts'

const quote = (name: string) => `"${name.replaceAll('"', '""')}"`

/**
 * Runs as the owner. `appRole` is the role of DATABASE_URL: it reads and writes everything, except that it can only add to the
 * trail. Safe to run again.
 */
export async function migrate(ownerUrl: string, appRole: string = APP_ROLE): Promise<void> {
  const boss = createBoss(ownerUrl, { owner: true })
  await boss.start()
  for (const name of Object.keys(JOBS) as JobName[]) {
    const failed = failedQueue(name)
    const options = { name, policy: 'standard', deadLetter: failed, ...queueOptions(name) } as const
    const failedOptions = { name: failed, policy: 'standard', ...FAILED_OPTIONS } as const
    await boss.createQueue(failed, failedOptions)
    await boss.updateQueue(failed, failedOptions)
    await boss.createQueue(name, options)
    // A queue made by an earlier version keeps its old options unless told.
    await boss.updateQueue(name, options)
  }
  await boss.stop({ graceful: true, wait: true })
  const source = await createDataSource(ownerUrl, { poolSize: 1 }).initialize()
  try {
    await source.runMigrations({ transaction: 'all' })
    const role = quote(appRole)
    for (const schema of ['public', 'pgboss']) {
      await source.query(`GRANT USAGE ON SCHEMA ${schema} TO ${role}`)
      await source.query(`GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA ${schema} TO ${role}`)
      await source.query(`GRANT USAGE ON ALL SEQUENCES IN SCHEMA ${schema} TO ${role}`)
      await source.query(`GRANT EXECUTE ON ALL FUNCTIONS IN SCHEMA ${schema} TO ${role}`)
    }
    await source.query(`REVOKE UPDATE, DELETE, TRUNCATE ON trail FROM ${role}`)
    await source.query(`REVOKE ALL ON migrations FROM ${role}`)
  } finally {
    await source.destroy()
  }
}

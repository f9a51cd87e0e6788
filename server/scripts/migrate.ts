/** `npm run migrate`: brings the database of MIGRATE_DATABASE_URL up to date for the role of DATABASE_URL. */
import { BadSettings, readWorkerSettings } from '../config.ts'
import { migrateFor } from './start/migrate-for.ts'

try {
  const { databaseUrl, migrateDatabaseUrl } = readWorkerSettings(process.env)
  if (migrateDatabaseUrl === undefined) throw new BadSettings(['MIGRATE_DATABASE_URL is missing'])
  await migrateFor(migrateDatabaseUrl, databaseUrl)
} catch (cause) {
  process.stderr.write(`${cause instanceof Error ? cause.message : String(cause)}\n`)
  process.exitCode = 1
}

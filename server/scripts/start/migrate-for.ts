import { step } from './say.ts'

/** Brings the database up to date as its owner, and gives the role that `appUrl` signs in as what it may do. */
export async function migrateFor(ownerUrl: string, appUrl: string): Promise<void> {
  const { migrate } = await import('../../db/migrate.ts')
  const appRole = decodeURIComponent(new URL(appUrl).username)
  await step('Bringing the database up to date', () => migrate(ownerUrl, appRole))
}

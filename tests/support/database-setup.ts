import { randomBytes } from 'node:crypto'
import type { TestProject } from 'vitest/node'
import { migrate } from '../../server/db/migrate.ts'
import { APP_ROLE, OWNER_ROLE, prepareDatabase, prepareRoles, withClient } from '../../server/postgres/roles.ts'
import { startThrowAway } from '../../server/postgres/throw-away.ts'

/** What the test files need to clone the template. */
export interface TestDatabases {
  adminUrl: string
  template: string
  owner: { role: string; password: string }
  app: { role: string; password: string }
}

declare module 'vitest' {
  export interface ProvidedContext {
    databases: TestDatabases
  }
}

/**
 * Once a run: a cluster (TEST_DATABASE_URL names a superuser's database when there is one to use), and one template
 * database with every migration in it, which each test file clones.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const given = process.env.TEST_DATABASE_URL
  const cluster = given === undefined ? await startThrowAway() : { adminUrl: given, stop: async () => undefined }
  // One password for every run on a given cluster, or two runs at once would lock each other out.
  const password = 'for-tests-only'
  const template = `template_${randomBytes(6).toString('hex')}`
  const databases: TestDatabases = {
    adminUrl: cluster.adminUrl,
    template,
    owner: { role: OWNER_ROLE, password },
    app: { role: APP_ROLE, password },
  }
  await withClient(cluster.adminUrl, async (admin) => {
    await prepareRoles(admin, { owner: password, app: password })
    await prepareDatabase(admin, template, databaseUrl(databases, 'admin', template))
  })
  await migrate(databaseUrl(databases, 'owner', template))
  project.provide('databases', databases)
  return async () => {
    await withClient(cluster.adminUrl, (admin) => admin.query(`DROP DATABASE IF EXISTS ${template}`))
    await cluster.stop()
  }
}

/** The address of database `name` for one of the three roles. */
export function databaseUrl(databases: TestDatabases, who: 'admin' | 'owner' | 'app', name: string): string {
  const url = new URL(databases.adminUrl)
  url.pathname = `/${name}`
  if (who === 'admin') return url.href
  url.username = databases[who].role
  url.password = databases[who].password
  return url.href
}

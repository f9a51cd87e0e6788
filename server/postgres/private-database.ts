import { createHash } from 'node:crypto'
import { mkdirSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import type { Client } from 'pg'
import { type Cluster, startCluster } from './cluster.ts'
import { canReach, clusterIdentity } from './identity.ts'
import { APP_ROLE, OWNER_ROLE, prepareDatabase, prepareRoles, withClient } from './roles.ts'
import type { Secrets } from './secrets.ts'

/** The private cluster with its roles and its one database. */
export interface PrivateDatabase {
  cluster: Cluster
  adminUrl: string
  ownerUrl: string
  appUrl: string
  /** Throws the database away and makes an empty one. */
  remake(): Promise<void>
}

/** The database of a private installation. */
export const DATABASE_NAME = 'sheafbook'

/**
 * Starts the cluster in `dataDir` and sees to its roles and database.
 * @param options.port wanted loopback port; another is taken when it is busy
 */
export async function startPrivateDatabase(options: {
  dataDir: string
  secrets: Secrets
  port?: number
  throwAway?: boolean
}): Promise<PrivateDatabase> {
  const { dataDir, secrets } = options
  mkdirSync(dirname(dataDir), { recursive: true })
  const cluster = await startCluster({ ...options, adminPassword: secrets.admin, logFile: `${dataDir}.log` })
  const adminUrl = cluster.url('postgres', secrets.admin, 'postgres')
  const prepare = (admin: Client) => prepareDatabase(admin, DATABASE_NAME, cluster.url('postgres', secrets.admin, DATABASE_NAME))
  await withClient(adminUrl, async (admin) => {
    await prepareRoles(admin, secrets)
    await prepare(admin)
  })
  return {
    cluster,
    adminUrl,
    ownerUrl: cluster.url(OWNER_ROLE, secrets.owner, DATABASE_NAME),
    appUrl: cluster.url(APP_ROLE, secrets.app, DATABASE_NAME),
    remake: () =>
      withClient(adminUrl, async (admin) => {
        await admin.query(`DROP DATABASE IF EXISTS ${DATABASE_NAME} WITH (FORCE)`)
        await prepare(admin)
      }),
  }
}

/**
 * Where the cluster's files go: `pg` under the data folder. When we are root and the user postgres cannot get there
 * (a checkout under /root), they go to that user's own home instead, under a name made from the data folder's path.
 */
export function clusterFolder(dataFolder: string, homeOfPostgres = '/var/lib/postgresql'): string {
  const wanted = join(resolve(dataFolder), 'pg')
  const identity = clusterIdentity()
  mkdirSync(dirname(wanted), { recursive: true })
  if (identity === null || canReach(identity, wanted)) return wanted
  const mark = createHash('sha256').update(wanted).digest('hex').slice(0, 12)
  return join(homeOfPostgres, `sheafbook-${mark}`, 'pg')
}

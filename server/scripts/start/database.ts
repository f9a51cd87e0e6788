import { findBinaries } from '../../postgres/binaries.ts'
import { CannotStart } from '../../postgres/cannot-start.ts'
import { isAlive } from '../../postgres/postmaster.ts'
import { clusterFolder, type PrivateDatabase, startPrivateDatabase } from '../../postgres/private-database.ts'
import type { Secrets } from '../../postgres/secrets.ts'
import { installFromDebian } from './debian.ts'
import { say, step } from './say.ts'
import type { StartSettings } from './start-settings.ts'

/** The database the processes use, and how to let go of it. */
export interface Database {
  appUrl: string
  /** Absent with a database of the user's own whose owner we were not told. */
  ownerUrl: string | undefined
  /** Present when the cluster is ours. */
  private: PrivateDatabase | undefined
  stop(): Promise<void>
}

const LOOK_EVERY_MS = 2_000

/** The database of DATABASE_URL, or the private cluster, which is watched and started again when it falls. */
export async function openDatabase(settings: StartSettings, secrets: Secrets): Promise<Database> {
  if (settings.DATABASE_URL !== undefined) {
    say('Using the database of DATABASE_URL.')
    return {
      appUrl: settings.DATABASE_URL,
      ownerUrl: settings.MIGRATE_DATABASE_URL,
      private: undefined,
      stop: async () => undefined,
    }
  }
  await seeToPostgres()
  const dataDir = settings.POSTGRES_DIR ?? clusterFolder(settings.DATA_DIR)
  if (!dataDir.startsWith(settings.DATA_DIR)) say(`The database's files are in ${dataDir}.`)
  const start = (port: number) => startPrivateDatabase({ dataDir, secrets, port })
  const database = await step('Starting the database', () => start(settings.POSTGRES_PORT))
  const stop = watch(database, start)
  return { appUrl: database.appUrl, ownerUrl: database.ownerUrl, private: database, stop }
}

/** Installs PostgreSQL when it is missing. */
export async function seeToPostgres(): Promise<void> {
  if (findBinaries() !== null) return
  await step('Installing PostgreSQL from Debian', () => installFromDebian(['postgresql'], 'PostgreSQL'))
}

/** A cluster taken over from a killed start is no child of ours, so its end is seen by looking. */
function watch(database: PrivateDatabase, start: (port: number) => Promise<PrivateDatabase>): () => Promise<void> {
  const { port } = database.cluster
  let cluster = database.cluster
  let restart: Promise<void> = Promise.resolve()
  const timer = setInterval(() => {
    if (isAlive(cluster.pid)) return
    restart = restart.then(async () => {
      if (isAlive(cluster.pid)) return
      say('The database ended; it is started again.')
      const next = await start(port)
      if (next.cluster.port !== port)
        throw new CannotStart(`The database's port ${port} was taken meanwhile.`, 'Stop with Ctrl-C and start again.')
      cluster = next.cluster
    })
    restart = restart.catch((cause: Error) => say(cause.message))
  }, LOOK_EVERY_MS)
  return async () => {
    clearInterval(timer)
    await restart
    await cluster.stop()
  }
}

import { type ChildProcess, spawn } from 'node:child_process'
import { chmodSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { openDatabase } from '../../server/db/database.ts'
import { migrate } from '../../server/db/migrate.ts'
import { isAlive } from '../../server/postgres/postmaster.ts'
import { type PrivateDatabase, startPrivateDatabase } from '../../server/postgres/private-database.ts'
import { withClient } from '../../server/postgres/roles.ts'
import { drawSecrets } from '../../server/postgres/secrets.ts'
import { createUser } from '../builders/user.ts'
import { waitFor } from '../support/wait-for.ts'
import { addPageTo } from './setting.ts'

/** Its own cluster, since it is stopped under everybody's feet. */
const folder = mkdtempSync(join(tmpdir(), 'sheafbook-restart-'))
const secrets = drawSecrets()
let database: PrivateDatabase
let worker: ChildProcess
let said = ''

const start = async (port?: number) => {
  database = await startPrivateDatabase({ dataDir: join(folder, 'pg'), secrets, throwAway: true, ...(port ? { port } : {}) })
}

beforeAll(async () => {
  chmodSync(folder, 0o755)
  await start()
  await migrate(database.ownerUrl)
  await withClient(database.ownerUrl, (owner) => owner.query('UPDATE pgboss.queue SET expire_seconds = 5'))
  worker = spawn(process.execPath, ['--import', 'tsx', 'tests/worker/crash-worker.ts'], {
    env: { ...process.env, DATABASE_URL: database.appUrl },
    stdio: ['pipe', 'pipe', 'inherit'],
  })
  worker.stdout?.on('data', (part: Buffer) => {
    said += part.toString()
  })
})
afterAll(async () => {
  worker.kill('SIGKILL')
  await database.cluster.stop()
  rmSync(folder, { recursive: true, force: true })
})

/** Each look opens and closes its own connections: none of the test's may be in the restart's way. */
async function withSource<T>(use: (source: Awaited<ReturnType<typeof openDatabase>>) => Promise<T>): Promise<T> {
  const source = await openDatabase(database.appUrl, { poolSize: 1 })
  try {
    return await use(source)
  } finally {
    await source.destroy()
  }
}

it('a worker outlives restarts of the database with a page in its hands, and reads that page and the next', async () => {
  const userId = await withSource(async (source) => (await createUser(source.manager)).id)
  for (const round of [1, 2, 3]) {
    said = ''
    const pageId = await withSource((source) => addPageTo(source, database.appUrl, userId, 'gate.jpg'))
    await waitFor(() => said.includes('reading gate.jpg'), { what: 'the worker to read', deadline_ms: 30_000 })
    // As a crash of the server: no session is ended in order.
    const { pid, port } = database.cluster
    process.kill(pid, 'SIGQUIT')
    await waitFor(() => !isAlive(pid), { what: 'the database to end' })
    worker.stdin?.write('go\n')
    await start(port)
    expect(database.cluster.port).toBe(port)
    const restarted = Date.now()
    const isRead = async () => {
      // The page may have been handed out again: that attempt waits for a word of its own.
      worker.stdin?.write('go\n')
      return withSource(
        async (source) => (await source.query('SELECT state FROM pages WHERE id = $1', [pageId]))[0].state === 'read',
      )
    }
    await waitFor(isRead, { what: `the page to be read after restart ${round}`, deadline_ms: 60_000, every_ms: 250 })
    // G-R7: all pages done within 60 s of the database's return.
    expect(Date.now() - restarted).toBeLessThan(60_000)
    expect(worker.exitCode).toBeNull()
  }
})

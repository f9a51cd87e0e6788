import { mkdtemp, rm } from 'node:fs/promises'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { createApp } from '../../server/app.ts'
import { readSettings } from '../../server/config.ts'
import { openDatabase } from '../../server/db/database.ts'
import { createBoss } from '../../server/db/queue.ts'
import type { Deps } from '../../server/http/route.ts'
import { createFileStore } from '../../server/storage/store.ts'
import type { Role, User } from '../../shared/schemas/user.ts'
import { createUser } from '../builders/user.ts'
import { createAgent, type TestAgent } from './agent.ts'
import { createTestDatabase, type TestDatabase } from './database.ts'

/** A whole server on its own database and folder, listening on a free port of the loopback. */
export interface TestServer {
  url: string
  deps: Deps
  database: TestDatabase
  /** What the server logged, with LOG_LEVEL given in `env`. */
  logged: string[]
  /** Somebody without a session. */
  anonymous(): TestAgent
  /** A new person of this role (or the one given), signed in. */
  signIn(who: Role | User): Promise<TestAgent & { user: User }>
  close(): Promise<void>
}

/**
 * Call it in `beforeAll`, and `close` in `afterAll`. `env` overrides settings by their names; `through` may put something
 * between the server and its database.
 */
export async function startTestServer(
  env: Record<string, string> = {},
  through: (databaseUrl: string) => Promise<string> = async (url) => url,
): Promise<TestServer> {
  const database = await createTestDatabase()
  const folder = await mkdtemp(join(tmpdir(), 'sheafbook-files-'))
  const settings = readSettings({
    DATABASE_URL: await through(database.url),
    SESSION_SECRET: 'a secret that signs the cookies of tests only',
    STORAGE_DIR: folder,
    WEB_DIR: join(folder, 'web'),
    LOG_LEVEL: 'silent',
    PORT: '0',
    ...env,
  })
  const source = await openDatabase(settings.databaseUrl, { poolSize: 8 })
  const boss = createBoss(settings.databaseUrl)
  boss.on('error', () => undefined)
  await boss.start()
  const deps: Deps = { source, boss, files: createFileStore(settings.store), settings }
  const logged: string[] = []
  const logTo = { write: (line: string) => void logged.push(line) }
  const server = createServer(createApp(deps, { checkResponses: true, logTo }))
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`
  return {
    url,
    deps,
    database,
    logged,
    anonymous: () => createAgent(url),
    signIn: async (who) => {
      const user = typeof who === 'string' ? await createUser(source.manager, { role: who }) : who
      const agent = createAgent(url)
      await agent.signIn(user.email)
      return Object.assign(agent, { user })
    },
    close: async () => {
      server.closeAllConnections()
      await new Promise((resolve) => server.close(resolve))
      await boss.stop({ graceful: false, wait: true })
      await source.destroy()
      await database.close()
      await rm(folder, { recursive: true, force: true })
    },
  }
}

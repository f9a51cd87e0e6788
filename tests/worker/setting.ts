/** A database with somebody in it, pages to read, and workers to read them. */
import { randomUUID } from 'node:crypto'
import { pino } from 'pino'
import type { DataSource } from '../../server/db/database.ts'
import { openDatabase } from '../../server/db/database.ts'
import { createBoss, sendJob } from '../../server/db/queue.ts'
import { insertPage } from '../../server/db/repositories/page.ts'
import { insertUpload } from '../../server/db/repositories/upload.ts'
import type { FileStore } from '../../server/storage/store.ts'
import { JOBS, type JobName } from '../../shared/jobs.ts'
import type { JobHandler } from '../../worker/jobs/job-handler.ts'
import { startWorker, type Worker } from '../../worker/start-worker.ts'
import { createUser } from '../builders/user.ts'
import { createTestDatabase, type TestDatabase } from '../support/database.ts'
import { waitFor } from '../support/wait-for.ts'

export const silent = pino({ level: 'silent' })

export interface Setting {
  database: TestDatabase
  source: DataSource
  boss: ReturnType<typeof createBoss>
  userId: string
  /** Shortens what a killed worker costs, so that a test need not wait 40 s. */
  expireAfter(seconds: number): Promise<void>
  /** A picture that arrived, with its page and its job. */
  addPage(fileName: string): Promise<string>
  pageOf(pageId: string): Promise<{ state: string; attempts: number; sheetId: string | null; pictureKey: string | null }>
  waitForState(pageId: string, state: string, deadline_ms?: number): Promise<void>
  start(handlers: (source: DataSource, boss: ReturnType<typeof createBoss>) => JobHandler[]): Promise<Worker>
  close(): Promise<void>
}

export async function createSetting(): Promise<Setting> {
  const database = await createTestDatabase()
  const source = await openDatabase(database.url, { poolSize: 4 })
  const boss = createBoss(database.url)
  boss.on('error', () => undefined)
  await boss.start()
  const { id: userId } = await createUser(source.manager)
  const workers: Worker[] = []
  const pageOf: Setting['pageOf'] = async (pageId) => {
    const rows = await source.query(
      'SELECT state, attempts, sheet_id AS "sheetId", picture_key AS "pictureKey" FROM pages WHERE id = $1',
      [pageId],
    )
    return rows[0]
  }
  return {
    database,
    source,
    boss,
    userId,
    pageOf,
    expireAfter: (seconds) => source.query('UPDATE pgboss.queue SET expire_seconds = $1', [seconds]),
    addPage: (fileName) => addPage(source, boss, userId, fileName),
    waitForState: async (pageId, state, deadline_ms = 20_000) => {
      await waitFor(async () => (await pageOf(pageId)).state === state, { what: `the page to be ${state}`, deadline_ms })
    },
    start: async (handlers) => {
      const worker = await startWorker(
        { databaseUrl: database.url, log: silent, maintenance_s: 1, handlers: (c) => withOthers(handlers(c.source, c.boss)) },
        new AbortController().signal,
      )
      workers.push(worker!)
      return worker!
    },
    close: async () => {
      await Promise.all(workers.map((worker) => worker.stop(0)))
      await boss.stop({ graceful: false, wait: true })
      await source.destroy()
      await database.close()
    },
  }
}

/** A handler for the jobs a test is not about: none of them may come. */
export const noneOf = (...names: JobName[]): JobHandler[] =>
  names.map((name) => ({
    name,
    handle: async () => {
      throw new Error(`no ${name} was expected`)
    },
    giveUp: async () => undefined,
  }))

/** A worker must have a handler for every job there is: those a test does not name may not come. */
function withOthers(handlers: readonly JobHandler[]): JobHandler[] {
  const named = new Set(handlers.map((handler) => handler.name))
  return [...handlers, ...noneOf(...(Object.keys(JOBS) as JobName[]).filter((name) => !named.has(name)))]
}

/** Files in memory. */
export function memoryStore(): FileStore & { kept: Map<string, Uint8Array> } {
  const kept = new Map<string, Uint8Array>()
  return {
    kept,
    put: async (key, bytes) => void kept.set(key, bytes),
    get: async (key) => Buffer.from(kept.get(key) ?? 'jpg'),
    stream: async () => {
      throw new Error('not in these tests')
    },
    exists: async (key) => kept.has(key),
    async *list() {
      for (const key of kept.keys()) yield { key, changedAt: new Date() }
    },
    remove: async (key) => void kept.delete(key),
  }
}

/** A door that opens when told, for reading that takes as long as the test says. */
export function gate() {
  let open: () => void = () => undefined
  let arrive: () => void = () => undefined
  const opened = new Promise<void>((resolve) => {
    open = resolve
  })
  const arrived = new Promise<void>((resolve) => {
    arrive = resolve
  })
  return {
    open,
    /** Resolves when somebody stands before it. */
    arrived,
    pass: () => {
      arrive()
      return opened
    },
  }
}

/** A picture that arrived, with its page and its job in one transaction, as the door writes them. */
async function addPage(source: DataSource, boss: Setting['boss'], userId: string, fileName: string): Promise<string> {
  return source.transaction(async (db) => {
    const uploadId = await insertUpload(db, {
      uploadedBy: userId,
      fileName,
      kind: 'jpeg',
      bytes: 3,
      sha256: randomUUID(),
      storageKey: `uploads/${randomUUID()}`,
      state: 'arrived',
      reason: null,
      forSheetId: null,
    })
    const pageId = await insertPage(db, { uploadId, number: 1 })
    await sendJob(boss, db, 'page-read', { pageId })
    return pageId
  })
}

/** The same with a queue of its own for the moment. */
export async function addPageTo(source: DataSource, url: string, userId: string, fileName: string): Promise<string> {
  const boss = createBoss(url)
  await boss.start()
  try {
    return await addPage(source, boss, userId, fileName)
  } finally {
    await boss.stop({ graceful: false, wait: true })
  }
}

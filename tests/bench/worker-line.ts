/** A queue full of pages in a database of its own, and worker processes that read them. */
import { type ChildProcess, spawn } from 'node:child_process'
import { randomUUID } from 'node:crypto'
import { once } from 'node:events'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { type DataSource, openDatabase } from '../../server/db/database.ts'
import { migrate } from '../../server/db/migrate.ts'
import { createBoss, sendJobs } from '../../server/db/queue.ts'
import { insertPage } from '../../server/db/repositories/page.ts'
import { insertUpload } from '../../server/db/repositories/upload.ts'
import { APP_ROLE, OWNER_ROLE, prepareDatabase, prepareRoles, withClient } from '../../server/postgres/roles.ts'
import { startThrowAway } from '../../server/postgres/throw-away.ts'
import { createFileStore, type FileStore } from '../../server/storage/store.ts'
import { createUser } from '../builders/user.ts'

const PASSWORD = 'for-the-bench-only'
const NAME = 'bench_worker'
const ENDING_WITH_US = ['--import', 'tsx', '--import', './server/scripts/start/end-with-parent.mjs']

export interface WorkerLine {
  source: DataSource
  /** Puts one page a picture into the queue; pictures take turns until there are `count` pages. */
  fill(pictures: readonly Buffer[], count: number): Promise<void>
  startWorker(): ChildProcess
  close(): Promise<void>
}

export async function openWorkerLine(): Promise<WorkerLine> {
  const cluster = await startThrowAway()
  const folder = await mkdtemp(join(tmpdir(), 'sheafbook-bench-'))
  const urlOf = (role?: string) => {
    const url = new URL(cluster.adminUrl)
    url.pathname = `/${NAME}`
    if (role) Object.assign(url, { username: role, password: PASSWORD })
    return url.href
  }
  await withClient(cluster.adminUrl, async (admin) => {
    await prepareRoles(admin, { owner: PASSWORD, app: PASSWORD })
    await prepareDatabase(admin, NAME, urlOf())
  })
  await migrate(urlOf(OWNER_ROLE))
  const databaseUrl = urlOf(APP_ROLE)
  const source = await openDatabase(databaseUrl, { poolSize: 2 })
  const workers: ChildProcess[] = []
  return {
    source,
    fill: (pictures, count) => fill(source, databaseUrl, createFileStore({ kind: 'folder', dir: folder }), pictures, count),
    startWorker: () => {
      // A channel to it, so that it ends when the bench is killed.
      const worker = spawn(process.execPath, [...ENDING_WITH_US, 'worker/main.ts'], {
        stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
        env: { ...process.env, DATABASE_URL: databaseUrl, STORAGE_DIR: folder, LOG_LEVEL: 'silent' },
      })
      workers.push(worker)
      return worker
    },
    close: async () => {
      await Promise.all(workers.map(stop))
      await source.destroy()
      await cluster.stop()
      await rm(folder, { recursive: true, force: true })
    },
  }
}

async function stop(worker: ChildProcess): Promise<void> {
  if (worker.exitCode !== null || worker.signalCode !== null) return
  worker.kill('SIGTERM')
  await once(worker, 'exit')
}

async function fill(source: DataSource, url: string, files: FileStore, pictures: readonly Buffer[], count: number) {
  const { id: uploadedBy } = await createUser(source.manager)
  const keys = pictures.map(() => `uploads/${randomUUID()}`)
  for (const [i, picture] of pictures.entries()) await files.put(keys[i]!, picture)
  const boss = createBoss(url)
  await boss.start()
  await source.transaction(async (db) => {
    const jobs: Array<{ pageId: string }> = []
    for (let n = 0; n < count; n += 1) {
      const i = n % pictures.length
      const uploadId = await insertUpload(db, {
        uploadedBy,
        fileName: `bench-${n}.jpg`,
        kind: 'jpeg',
        bytes: pictures[i]!.length,
        sha256: randomUUID(),
        storageKey: keys[i]!,
        state: 'arrived',
        reason: null,
        forSheetId: null,
      })
      jobs.push({ pageId: await insertPage(db, { uploadId, number: 1 }) })
    }
    await sendJobs(boss, db, 'page-read', jobs)
  })
  await boss.stop({ graceful: false, wait: true })
}

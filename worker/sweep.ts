/**
 * Files whose row was never written, because a process died between the two, are removed after a day. Bytes are kept before
 * their row, so a file of today may still get one.
 */
import type { Logger } from 'pino'
import type { Db } from '../server/db/database.ts'
import { listNamedFiles } from '../server/db/repositories/named-files.ts'
import type { FileStore } from '../server/storage/store.ts'
import { pause } from './poll.ts'

const LEAST_AGE_MS = 24 * 3_600_000
const EVERY_MS = 6 * 3_600_000
/** Not at the start, when photos may be waiting. */
const FIRST_AFTER_MS = 10 * 60_000
/** Keys a question to the database. */
const AT_ONCE = 500
/** What lies elsewhere in the store is somebody else's. */
const OURS = /^(uploads|pictures|uprights)\//

/** @returns the keys that were removed */
export async function sweepFiles(db: Db, files: FileStore, now = new Date()): Promise<string[]> {
  const removed: string[] = []
  let batch: string[] = []
  const judge = async () => {
    const named = await listNamedFiles(db, batch)
    for (const key of batch.filter((k) => !named.has(k))) {
      await files.remove(key)
      removed.push(key)
    }
    batch = []
  }
  for await (const { key, changedAt } of files.list()) {
    if (!OURS.test(key) || now.getTime() - changedAt.getTime() < LEAST_AGE_MS) continue
    batch.push(key)
    if (batch.length === AT_ONCE) await judge()
  }
  await judge()
  return removed
}

/** Sweeps a few times a day until `stop` fires; what goes wrong is said, and tried again with the next sweep. */
export async function keepSwept(db: Db, files: FileStore, log: Logger, stop: AbortSignal): Promise<void> {
  await pause(FIRST_AFTER_MS, stop)
  while (!stop.aborted) {
    try {
      const removed = await sweepFiles(db, files)
      if (removed.length > 0) log.info({ removed: removed.length }, 'files without a row removed')
    } catch (cause) {
      log.warn({ err: cause }, 'sweeping the store failed')
    }
    await pause(EVERY_MS, stop)
  }
}

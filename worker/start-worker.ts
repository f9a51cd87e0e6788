/** A worker: connects, takes jobs of every queue, and ends in order. */
import type PgBoss from 'pg-boss'
import type { Logger } from 'pino'
import { type DataSource, openDatabase } from '../server/db/database.ts'
import { createBoss, failedQueue } from '../server/db/queue.ts'
import { JOBS, type JobName } from '../shared/jobs.ts'
import { attempt, type FetchedJob } from './attempt.ts'
import { checkHandlers, type JobHandler } from './jobs/job-handler.ts'
import { pause, poll } from './poll.ts'

/** One look at an empty queue every half second: a photo waits that long at most for a worker that is free. */
export const POLL_MS = 500
/** Nobody waits at a screen for a job that was given up. */
const POLL_FAILED_MS = 2_000
const CONNECT_PAUSES_MS = [500, 1_000, 2_000, 5_000, 10_000]

export interface WorkerOptions {
  databaseUrl: string
  poolSize?: number
  log: Logger
  /** Seconds between maintenance ticks of the queue; a test shortens it. */
  maintenance_s?: number
  /** Makes the handlers once the database is there. */
  handlers(connected: { source: DataSource; boss: PgBoss }): readonly JobHandler[]
}

export interface Worker {
  /**
   * Takes no new job, waits for those in hand, then hands back what is still not done. Safe to call twice.
   * @param patience_ms how long to wait
   */
  stop(patience_ms: number): Promise<void>
}

/** Waits for the database as long as it takes (or `stop` fires): a worker may be started before it. */
export async function startWorker(options: WorkerOptions, stop: AbortSignal): Promise<Worker | null> {
  const connected = await connect(options, stop)
  if (!connected) return null
  const { source, boss } = connected
  const handlers = checkHandlers(options.handlers(connected))
  const noMore = new AbortController()
  const giveBack = new AbortController()
  const loops = [...handlers.values()].flatMap((handler) => [
    run(handler.name, POLL_MS, (data, signal) => handler.handle(data as never, { signal })),
    run(failedQueue(handler.name), POLL_FAILED_MS, async (data) => {
      await handler.giveUp(data as never)
      return 'done'
    }),
  ])

  function run(queue: string, pause_ms: number, work: Parameters<typeof attempt>[1]): Promise<void> {
    const log = options.log.child({ queue })
    const ends = {
      complete: async (id: string) => void (await boss.complete(queue, id)),
      fail: async (id: string, message: string) => void (await boss.fail(queue, id, { message })),
    }
    const fetch = async () => {
      const [job] = await boss.fetch<unknown>(queue, { batchSize: 1 })
      return job ? () => attempt(job as FetchedJob, work, ends, { stop: giveBack.signal, log }) : null
    }
    return poll({ fetch, pause_ms, stop: noMore.signal })
  }

  let stopping: Promise<void> | undefined
  const end = async (patience_ms: number) => {
    noMore.abort()
    const timer = setTimeout(() => giveBack.abort(new Error('the worker is stopping')), patience_ms)
    await Promise.all(loops)
    clearTimeout(timer)
    await boss.stop({ graceful: false, wait: true }).catch((cause: unknown) => options.log.warn({ err: cause }, 'queue'))
    await source.destroy()
  }
  return {
    stop: (patience_ms) => {
      stopping ??= end(patience_ms)
      return stopping
    },
  }
}

async function connect(options: WorkerOptions, stop: AbortSignal): Promise<{ source: DataSource; boss: PgBoss } | null> {
  for (let tries = 0; !stop.aborted; tries += 1) {
    try {
      return await connectOnce(options)
    } catch (cause) {
      options.log.warn({ err: cause }, 'the database cannot be used yet')
      await pause(CONNECT_PAUSES_MS[Math.min(tries, CONNECT_PAUSES_MS.length - 1)]!, stop)
    }
  }
  return null
}

async function connectOnce(options: WorkerOptions): Promise<{ source: DataSource; boss: PgBoss }> {
  const source = await openDatabase(options.databaseUrl, { poolSize: options.poolSize ?? 5 })
  // A queue whose start failed believes it is starting for ever, so each try makes its own.
  const boss = createBoss(options.databaseUrl, { maintenance_s: options.maintenance_s })
  boss.on('error', (cause) => options.log.warn({ err: cause }, 'queue'))
  try {
    await boss.start()
    await checkQueues(boss)
    return { source, boss }
  } catch (cause) {
    await boss.stop({ graceful: false, wait: true }).catch(() => undefined)
    await source.destroy()
    throw cause
  }
}

/** A queue that is missing would look like one that is always empty. */
async function checkQueues(boss: PgBoss): Promise<void> {
  for (const name of Object.keys(JOBS) as JobName[]) {
    if (!(await boss.getQueue(name)) || !(await boss.getQueue(failedQueue(name))))
      throw new Error(`the queue ${name} is missing: is the database migrated?`)
  }
}

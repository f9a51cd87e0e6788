/** One attempt at one job: handled within its time, then completed, failed or left, with nothing thrown. */
import type { Logger } from 'pino'
import type { JobEnd } from './jobs/job-handler.ts'

export interface FetchedJob {
  id: string
  data: unknown
  expireInSeconds: number
}

/** How a job is ended at the queue. */
export interface JobEnds {
  complete(id: string): Promise<void>
  fail(id: string, message: string): Promise<void>
}

/** The share of a job's expiry after which an attempt gives up by itself, while the job is still its own. */
export const OWN_LIMIT = 0.8

/**
 * @param work what handles the job's payload
 * @param stop fires when the process ends: the attempt is handed back at once
 */
export async function attempt(
  job: FetchedJob,
  work: (data: unknown, signal: AbortSignal) => Promise<JobEnd>,
  ends: JobEnds,
  options: { stop: AbortSignal; log: Logger },
): Promise<void> {
  const { stop, log } = options
  const limit_ms = job.expireInSeconds * OWN_LIMIT * 1000
  const signal = AbortSignal.any([stop, AbortSignal.timeout(limit_ms)])
  try {
    const end = await beforeAbort(work(job.data, signal), signal)
    if (end === 'late') log.warn({ job: job.id }, 'late: another attempt has the work')
    else await insist(() => ends.complete(job.id), options)
  } catch (cause) {
    log.warn({ job: job.id, err: cause }, 'attempt failed')
    await insist(() => ends.fail(job.id, cause instanceof Error ? cause.message : String(cause)), options)
  }
}

/** The work may not heed the signal; nobody waits for it then, and its late writes are fenced off. */
function beforeAbort<T>(work: Promise<T>, signal: AbortSignal): Promise<T> {
  return new Promise((resolve, reject) => {
    const abort = () => reject(signal.reason)
    signal.addEventListener('abort', abort, { once: true })
    work.then(resolve, reject).finally(() => signal.removeEventListener('abort', abort))
  })
}

const TRIES_MS = [0, 250, 500, 1_000, 2_000, 4_000]

/**
 * The database may be restarting. If it stays away, the job expires and another attempt finds the work done: handlers are safe
 * to run twice.
 */
async function insist(end: () => Promise<void>, { log }: { log: Logger }): Promise<void> {
  let last: unknown
  for (const pause_ms of TRIES_MS) {
    if (pause_ms > 0) await new Promise((resolve) => setTimeout(resolve, pause_ms))
    try {
      return await end()
    } catch (cause) {
      last = cause
    }
  }
  log.warn({ err: last }, 'the queue could not be told; the job will expire')
}

/** What does a job of one name, and what is said when its attempts are used up. */
import { JOBS, type JobName, type JobPayload } from '../../shared/jobs.ts'

/** late: another attempt has taken the work over, so the job is that attempt's to end. */
export type JobEnd = 'done' | 'late'

export interface JobContext {
  /** Fires when the attempt should give up by itself, before the queue hands the job to somebody else. */
  signal: AbortSignal
}

export interface JobHandler<N extends JobName = JobName> {
  name: N
  /** Throwing means: again. Safe to run twice. */
  handle(payload: JobPayload<N>, context: JobContext): Promise<JobEnd>
  /** No attempt is left: marks the row, so that nobody waits for ever. Safe to run twice. */
  giveUp(payload: JobPayload<N>): Promise<void>
}

/** Forgets the payload's type, so that handlers of all jobs fit one table; the payload is parsed before it is handed over. */
export const defineJob = <N extends JobName>(handler: JobHandler<N>): JobHandler => ({
  name: handler.name,
  handle: (payload, context) => handler.handle(JOBS[handler.name].parse(payload) as JobPayload<N>, context),
  giveUp: (payload) => handler.giveUp(JOBS[handler.name].parse(payload) as JobPayload<N>),
})

/**
 * One handler for every job there is.
 * @throws Error naming each job without a handler, and each with two: the process must not start
 */
export function checkHandlers(handlers: readonly JobHandler[]): ReadonlyMap<JobName, JobHandler> {
  const byName = new Map(handlers.map((handler) => [handler.name, handler]))
  const missing = (Object.keys(JOBS) as JobName[]).filter((name) => !byName.has(name))
  const double = handlers.filter((handler) => byName.get(handler.name) !== handler).map((handler) => handler.name)
  const faults = [...missing.map((name) => `${name} has no handler`), ...double.map((name) => `${name} has two handlers`)]
  if (faults.length > 0) throw new Error(`The worker cannot start: ${faults.join(', ')}.`)
  return byName
}

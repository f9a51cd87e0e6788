/** Looks at one queue again and again, and works through what is there. It knows nothing of the queue but how to fetch. */
export interface Poll {
  /** The next job; null when there is none, or the queue is away. Must not throw. */
  fetch(): Promise<(() => Promise<void>) | null>
  /** How long to wait after an empty look. */
  pause_ms: number
  stop: AbortSignal
}

/** Ends after the job in hand when `stop` fires. */
export async function poll({ fetch, pause_ms, stop }: Poll): Promise<void> {
  while (!stop.aborted) {
    const work = await fetch()
    if (work) await work()
    else await pause(pause_ms, stop)
  }
}

/** Resolves after the time, or at once when `stop` fires. */
export function pause(ms: number, stop: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    if (stop.aborted) return resolve()
    const end = () => {
      clearTimeout(timer)
      stop.removeEventListener('abort', end)
      resolve()
    }
    const timer = setTimeout(end, ms)
    stop.addEventListener('abort', end, { once: true })
  })
}

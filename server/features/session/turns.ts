import { TransientError } from '../../../shared/errors.ts'

/**
 * Lets `atOnce` pieces of work run side by side and the others wait in line.
 * @throws TransientError (from the returned function) when `mostWaiting` are in line already
 */
export function createTurns(atOnce: number, mostWaiting: number) {
  let free = atOnce
  const line: (() => void)[] = []
  const enter = async () => {
    if (free > 0) {
      free -= 1
      return
    }
    if (line.length >= mostWaiting) throw new TransientError('Too much is waiting in line.', { retryAfter_s: 5 })
    await new Promise<void>((resolve) => line.push(resolve))
  }
  return async <T>(work: () => Promise<T>): Promise<T> => {
    await enter()
    try {
      return await work()
    } finally {
      // The place goes over to the next in line, without being free in between.
      const next = line.shift()
      if (next) next()
      else free += 1
    }
  }
}

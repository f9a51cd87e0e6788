/** The page reader of the worker: one reading process, started when the first picture comes and again after it was ended. */
import { type ChildProcess, fork } from 'node:child_process'
import { resolve } from 'node:path'
import type { KnownNumbers } from '../../server/db/repositories/known-numbers.ts'
import { PARSER_LIMITS } from '../../shared/limits.ts'
import type { PagePicture, PageReader, ReadPicture } from '../jobs/page-reader.ts'
import type { ReadingAnswer, ReadingRequest } from './reading-messages.ts'
import { watchMemory } from './watch-memory.ts'

interface ReadingOptions {
  /** The numbers that registers hold, asked for each page: they change while the process runs. */
  listKnown: () => Promise<KnownNumbers>
  /** Another one lets a test run a reader that misbehaves. */
  script?: string
}

/** Call `warm` at the start: nets and code finder take seconds to load, which the first photo of the day need not wait for. */
export function createReadingProcess({
  listKnown,
  script = resolve('worker/child/reading.ts'),
}: ReadingOptions): PageReader & { warm(): void } {
  let child: ChildProcess | undefined
  let last = 0
  const living = () => {
    if (child?.connected) return child
    child = fork(script, {
      execArgv: [`--max-old-space-size=${PARSER_LIMITS.heap_mb}`, '--import', 'tsx'],
      serialization: 'advanced',
      stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
      env: {},
    })
    return child
  }
  return {
    warm: () => void living(),
    read: async (picture: PagePicture, signal: AbortSignal) => {
      const known = await listKnown()
      signal.throwIfAborted()
      last += 1
      const asked = living()
      // Killed, it still looks alive for a moment; the next picture must not be given to it.
      const drop = () => {
        child = undefined
        asked.kill('SIGKILL')
      }
      return ask(asked, { id: last, picture, known }, signal, drop)
    },
    close: async () => {
      if (!child?.connected) return
      const ended = new Promise((done) => child?.once('exit', done))
      child.disconnect()
      await ended
    },
  }
}

/** Whatever ends the reading early ends its process with it: it may be in the middle of what never ends. */
function ask(child: ChildProcess, request: ReadingRequest, signal: AbortSignal, drop: () => void): Promise<ReadPicture> {
  return new Promise((done, fail) => {
    const unwatch = watchMemory(child.pid, PARSER_LIMITS.resident_mb, () => child.kill('SIGKILL'))
    const end = (act: () => void) => {
      unwatch()
      child.off('message', hear).off('exit', gone).off('error', fault)
      signal.removeEventListener('abort', abort)
      act()
    }
    const hear = (answer: ReadingAnswer) => {
      if (answer.id !== request.id) return
      end(() => ('read' in answer ? done(answer.read) : fail(new Error(`reading failed: ${answer.fault}`))))
    }
    const gone = (code: number | null, by: string | null) =>
      end(() => fail(new Error(`the reading process ended (${by ?? code})`)))
    const fault = (cause: Error) => end(() => fail(cause))
    const abort = () => {
      drop()
      end(() => fail(signal.reason))
    }
    child.on('message', hear).once('exit', gone).once('error', fault)
    signal.addEventListener('abort', abort, { once: true })
    child.send(request, (cause) => cause && fault(cause))
  })
}

/**
 * A worker process for the crash tests: the real loop and the real page job, with a reader that hangs on "hang.jpg" (when told
 * to), waits for a word on standard input at "gate.jpg", and kills its own process on "poison.jpg". It says on standard output
 * when it starts to read.
 */
import { once } from 'node:events'
import { pino } from 'pino'
import { pageReadJob } from '../../worker/jobs/page-read.job.ts'
import { startWorker } from '../../worker/start-worker.ts'
import { readOutcome } from './outcomes.ts'
import { memoryStore, noneOf } from './setting.ts'

const hangs = process.argv.includes('hang')
await startWorker(
  {
    databaseUrl: process.env.DATABASE_URL!,
    log: pino({ level: 'silent' }),
    maintenance_s: 1,
    handlers: ({ source }) => [
      ...noneOf('upload-split', 'mail-send', 'webhook-send'),
      pageReadJob({
        source,
        files: memoryStore(),
        reader: {
          read: async ({ fileName }) => {
            process.stdout.write(`reading ${fileName}\n`)
            if (fileName === 'poison.jpg') process.kill(process.pid, 'SIGKILL')
            if (fileName === 'gate.jpg') await once(process.stdin, 'data')
            if (fileName === 'hang.jpg' && hangs) await new Promise(() => undefined)
            return { outcome: readOutcome(), picture: null }
          },
          close: async () => undefined,
        },
      }),
    ],
  },
  new AbortController().signal,
)

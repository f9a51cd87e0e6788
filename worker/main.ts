/** The worker's process: wires, works, and ends in order. */
import { pino } from 'pino'
import { BadSettings, readWorkerSettings, type WorkerSettings } from '../server/config.ts'
import { isDatabaseAway } from '../server/db/driver-errors.ts'
import { listKnownNumbers } from '../server/db/repositories/known-numbers.ts'
import { createMailer } from '../server/mail/mailer.ts'
import { createFileStore } from '../server/storage/store.ts'
import { createReadingProcess } from './child/reading-process.ts'
import { runParser } from './child/run-parser.ts'
import { mailSendJob } from './jobs/mail-send.job.ts'
import { pageReadJob } from './jobs/page-read.job.ts'
import type { PageReader } from './jobs/page-reader.ts'
import { uploadSplitJob } from './jobs/upload-split.job.ts'
import { webhookSendJob } from './jobs/webhook-send.job.ts'
import { startWorker } from './start-worker.ts'
import { keepSwept } from './sweep.ts'

/** A page in hand is waited for this long, then handed back; the process is gone within 20 s of being told. */
const PATIENCE_MS = 12_000
const STOP_LIMIT_MS = 18_000

async function run(settings: WorkerSettings): Promise<void> {
  const log = pino({ level: settings.logLevel, name: 'worker' })
  const files = createFileStore(settings.store)
  const mailer = createMailer(settings.smtpUrl, settings.mailFrom)
  const stop = new AbortController()
  let reader: PageReader | undefined
  const starting = startWorker(
    {
      databaseUrl: settings.databaseUrl,
      poolSize: settings.databasePool,
      log,
      handlers: ({ source, boss }) => {
        const reading = createReadingProcess({ listKnown: () => listKnownNumbers(source.manager) })
        reading.warm()
        reader = reading
        void keepSwept(source.manager, files, log, stop.signal)
        return [
          uploadSplitJob({ source, boss, files, parse: runParser }),
          pageReadJob({ source, files, reader }),
          mailSendJob({ source, mailer }),
          webhookSendJob({ source, boss, allowPrivate: settings.webhookAllowPrivate }),
        ]
      },
    },
    stop.signal,
  )
  let ending = false
  const end = async (code: number) => {
    if (ending) return
    ending = true
    setTimeout(() => process.exit(1), STOP_LIMIT_MS).unref()
    stop.abort()
    const worker = await starting.catch(() => null)
    await worker?.stop(PATIENCE_MS)
    await reader?.close()
    mailer.close()
    log.info('stopped')
    process.exit(code)
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void end(0))
  // A promise nobody waited for may only have lost its database; anything else is a bug, and a fresh process is the cure.
  process.on('unhandledRejection', (cause) => {
    log.error({ err: cause }, 'a promise nobody waited for')
    if (!isDatabaseAway(cause)) void end(1)
  })
  if (await starting) log.info('taking jobs')
}

try {
  await run(readWorkerSettings(process.env))
} catch (error) {
  process.stderr.write(`${error instanceof BadSettings ? error.message : ((error as Error).stack ?? String(error))}\n`)
  process.exit(1)
}

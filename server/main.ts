/** The web server's process: wires, listens, and ends in order. */
import { createApp } from './app.ts'
import { BadSettings, readSettings, type Settings } from './config.ts'
import { openDatabase } from './db/database.ts'
import { createBoss } from './db/queue.ts'
import { createListener } from './http/listen.ts'
import { createLogger } from './http/log.ts'
import { createFileStore } from './storage/store.ts'

/** Longer than requests in hand are waited for, shorter than a supervisor's patience. */
const STOP_LIMIT_MS = 18_000

async function run(settings: Settings): Promise<void> {
  const logger = createLogger(settings.logLevel)
  const source = await openDatabase(settings.databaseUrl, { poolSize: settings.databasePool })
  const boss = createBoss(settings.databaseUrl)
  // The queue speaks up when the database goes away; requests then answer 503, and it comes back by itself.
  boss.on('error', (error) => logger.warn({ err: error }, 'queue'))
  await boss.start()
  const listener = createListener(createApp({ source, boss, files: createFileStore(settings.store), settings }), settings)
  const port = await listener.start()
  logger.info({ host: settings.host, port }, 'listening')
  const { publicUrl, trustedProxies } = settings
  if (publicUrl.startsWith('https:') && trustedProxies === 0) {
    logger.warn('PUBLIC_URL is https and TRUSTED_PROXIES is 0: without a proxy that is trusted nobody can sign in')
  }
  const end = async (signal: string) => {
    logger.info({ signal }, 'stopping')
    setTimeout(() => process.exit(1), STOP_LIMIT_MS).unref()
    await listener.stop()
    await boss.stop({ graceful: false, wait: true }).catch(() => undefined)
    await source.destroy().catch(() => undefined)
    process.exit(0)
  }
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void end(signal))
}

try {
  await run(readSettings(process.env))
} catch (error) {
  process.stderr.write(`${error instanceof BadSettings ? error.message : ((error as Error).stack ?? String(error))}\n`)
  process.exit(1)
}

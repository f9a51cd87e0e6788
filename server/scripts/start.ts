/**
 * `npm start`: everything on one machine, from an empty folder to a signed-in browser. Ctrl-C stops all of it.
 * Each step says what it does; what fails says what happened and what to do.
 */
import { join } from 'node:path'
import { BadSettings, readSettings } from '../config.ts'
import { CannotStart } from '../postgres/cannot-start.ts'
import { keepSecrets } from '../postgres/secrets.ts'
import { beginSeason } from './start/begin-season.ts'
import { buildWeb, webIsBuilt } from './start/build-web.ts'
import { openDatabase } from './start/database.ts'
import { greet } from './start/greet.ts'
import { isReady } from './start/is-ready.ts'
import { startLocalMail } from './start/mail.ts'
import { takeFolder } from './start/only-one.ts'
import { choosePort } from './start/port.ts'
import { say, seconds, step } from './start/say.ts'
import { readStartSettings, type StartSettings } from './start/start-settings.ts'
import { Stops } from './start/stops.ts'
import { type Supervised, supervise } from './start/supervise.ts'

const READY_WITHIN_MS = 90_000
/** A server that falls this often before its first answer will not recover by itself. */
const FALLS_BEFORE_GIVING_UP = 3

const stops = new Stops()
// A closed terminal must not keep us from stopping what was started.
for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined)
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => void stops.runAndExit(0, 'Stopping …'))

try {
  await start(readStartSettings(process.env, process.argv.slice(2)))
} catch (cause) {
  if (!stops.begun) {
    const known = cause instanceof CannotStart || cause instanceof BadSettings
    process.stderr.write(`\n${known ? cause.message : cause instanceof Error ? cause.stack : String(cause)}\n`)
    await stops.runAndExit(1)
  }
}

async function start(own: StartSettings): Promise<void> {
  const begin = Date.now()
  stops.add(takeFolder(own.DATA_DIR))
  const secrets = keepSecrets(join(own.DATA_DIR, 'secrets.json'))
  const port = await choosePort(own.PORT)
  const known: Record<string, string | undefined> = {
    ...defaults(own.DATA_DIR, port, secrets.session),
    ...present(process.env),
    PORT: String(port),
  }
  const webDir = known.WEB_DIR ?? join(own.DATA_DIR, 'web')
  const built = webIsBuilt(webDir) ? Promise.resolve() : step('Building the web app', () => buildWeb(webDir))
  built.catch(() => undefined)
  const database = await openDatabase(own, secrets)
  stops.add(database.stop)
  const mail = own.SMTP_URL === undefined ? await startLocalMail(own.SMTP_PORT, join(own.DATA_DIR, 'mail')) : undefined
  if (mail !== undefined) stops.add(mail.close)

  const env: Record<string, string | undefined> = { ...known, DATABASE_URL: database.appUrl, SMTP_URL: mail?.url ?? own.SMTP_URL }
  // The processes that serve people cannot change tables.
  env.MIGRATE_DATABASE_URL = undefined
  const settings = readSettings(env)
  const run = (name: 'server' | 'worker') => {
    const process = supervise({ name, script: `${name}/main.ts`, env, logFile: join(own.DATA_DIR, `${name}.log`), say })
    stops.add(process.stop)
    return process
  }
  const season = await beginSeason(database, settings, {
    dataFolder: own.DATA_DIR,
    empty: own.empty,
    startWorker: () => run('worker'),
  })
  await built
  await step('Starting the server and a worker', () => waitForServer(run('server'), run('worker'), settings.port))
  await greet(settings, season, own.DATA_DIR)
  say(`Started in ${seconds(begin)}. Ctrl-C stops everything.`)
}

function defaults(dataFolder: string, port: number, sessionSecret: string): Record<string, string> {
  return {
    SESSION_SECRET: sessionSecret,
    STORAGE_DIR: join(dataFolder, 'files'),
    WEB_DIR: join(dataFolder, 'web'),
    PUBLIC_URL: `http://localhost:${port}`,
  }
}

function present(env: NodeJS.ProcessEnv): Record<string, string | undefined> {
  return Object.fromEntries(Object.entries(env).filter(([, value]) => value !== undefined && value.trim() !== ''))
}

async function waitForServer(server: Supervised, worker: Supervised, port: number): Promise<void> {
  const deadline = Date.now() + READY_WITHIN_MS
  while (!(await isReady(port))) {
    const fallen = [server, worker].find((process) => process.falls() >= FALLS_BEFORE_GIVING_UP)
    if (fallen !== undefined) throw new CannotStart(`The ${fallen.name} does not start. Its log ends:\n${fallen.lastWords()}`, '')
    if (Date.now() > deadline)
      throw new CannotStart(`The server does not answer on port ${port}. Its log ends:\n${server.lastWords()}`, '')
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
}

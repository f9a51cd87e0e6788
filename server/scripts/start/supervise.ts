import { type ChildProcess, spawn } from 'node:child_process'
import { closeSync, existsSync, openSync, readFileSync, renameSync, statSync } from 'node:fs'
import { fallAgain, NO_FALLS } from './backoff.ts'

/** A process that is started again whenever it ends. */
export interface Supervised {
  name: string
  /** How often it has ended by itself since it was last well. */
  falls(): number
  /** The end of its log, for a message. */
  lastWords(): string
  /** Asks it to end (SIGTERM), insists after 20 s, and returns when it is gone. */
  stop(): Promise<void>
}

const STOP_WITHIN_MS = 20_000
const LONGEST_LOG_BYTES = 10_000_000

/**
 * Starts `node --import tsx SCRIPT` and keeps it running.
 * @param options.say is told when it ended and when it comes back
 */
export function supervise(options: {
  name: string
  script: string
  env: NodeJS.ProcessEnv
  logFile: string
  say: (line: string) => void
}): Supervised {
  let falls = NO_FALLS
  let stopping = false
  let timer: NodeJS.Timeout | undefined
  let child = start()

  function start(): ChildProcess {
    const begin = Date.now()
    const started = launch(options.script, options.env, options.logFile)
    started.once('exit', (code, signal) => {
      if (stopping) return
      falls = fallAgain(falls, Date.now() - begin)
      options.say(
        `The ${options.name} ended (${signal ?? `code ${code}`}); it is started again in ${falls.wait_ms / 1000} s. Its log: ${options.logFile}`,
      )
      timer = setTimeout(() => {
        child = start()
      }, falls.wait_ms)
    })
    return started
  }

  return {
    name: options.name,
    falls: () => falls.inARow,
    lastWords: () => readFileSync(options.logFile, 'utf8').trim().split('\n').slice(-15).join('\n'),
    async stop() {
      stopping = true
      clearTimeout(timer)
      await end(child)
    },
  }
}

function launch(script: string, env: NodeJS.ProcessEnv, logFile: string): ChildProcess {
  if (existsSync(logFile) && statSync(logFile).size > LONGEST_LOG_BYTES) renameSync(logFile, `${logFile}.1`)
  const log = openSync(logFile, 'a', 0o640)
  const args = ['--import', 'tsx', '--import', './server/scripts/start/end-with-parent.mjs', script]
  // Detached: Ctrl-C in the terminal reaches only us, and we end everything in order. The channel tells it when we die.
  const child = spawn(process.execPath, args, { env, detached: true, stdio: ['ignore', log, log, 'ipc'] })
  closeSync(log)
  child.on('error', () => undefined)
  return child
}

async function end(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return
  const gone = new Promise<void>((resolve) => child.once('exit', () => resolve()))
  child.kill('SIGTERM')
  const insist = setTimeout(() => child.kill('SIGKILL'), STOP_WITHIN_MS)
  await gone
  clearTimeout(insist)
}

/** Runs the parser process on one file. */
import { spawn } from 'node:child_process'
import { resolve } from 'node:path'
import { PARSER_LIMITS } from '../../shared/limits.ts'
import { answerSchema, type ParsedKind, type ParserAnswer } from './answer.ts'
import { watchMemory } from './watch-memory.ts'

export interface ParserOptions {
  signal: AbortSignal
  /** What is run with the kind as argument; another one lets a test run a parser that misbehaves. */
  script?: string
  time_s?: number
  heap_mb?: number
  resident_mb?: number
}

/** A file that ends its parser is a file to refuse, not a job to repeat. */
const TOO_MUCH =
  'This file takes more memory or time to open than any form or scan needs, or ends the program that opens it. Nothing was kept.'
const SEND_ELSE = "Take a fresh form from the layout's page, or scan fewer sheets into one file."
/** An answer larger than this is no list of runs. */
const MOST_ANSWER_BYTES = 64_000_000

/**
 * @returns the parser's answer; a refusal when the file broke its limits
 * @throws the signal's reason when it fires first: the file may be good, the attempt is over
 */
export async function runParser(kind: ParsedKind, bytes: Uint8Array, options: ParserOptions): Promise<ParserAnswer> {
  const {
    signal,
    script = resolve('worker/child/parse.ts'),
    time_s = PARSER_LIMITS.time_s,
    heap_mb = PARSER_LIMITS.heap_mb,
    resident_mb = PARSER_LIMITS.resident_mb,
  } = options
  signal.throwIfAborted()
  const args = [`--max-old-space-size=${heap_mb}`, '--import', 'tsx', script, kind]
  const child = spawn(process.execPath, args, {
    stdio: ['pipe', 'pipe', 'ignore'],
    env: {},
    timeout: time_s * 1000,
    killSignal: 'SIGKILL',
  })
  const kill = () => child.kill('SIGKILL')
  signal.addEventListener('abort', kill, { once: true })
  const unwatch = watchMemory(child.pid, resident_mb, kill)
  try {
    // A parser that dies while the file is still being handed over closes the pipe; its exit tells the rest.
    child.stdin.on('error', () => undefined)
    child.stdin.end(bytes)
    const parts: Buffer[] = []
    let size = 0
    child.stdout.on('data', (part: Buffer) => {
      size += part.length
      if (size > MOST_ANSWER_BYTES) kill()
      else parts.push(part)
    })
    const code = await new Promise<number | null>((done, fail) => child.on('error', fail).on('close', done))
    signal.throwIfAborted()
    if (code !== 0 || size > MOST_ANSWER_BYTES) return { kind: 'refused', reason: `${TOO_MUCH} ${SEND_ELSE}` }
    return answerSchema.parse(JSON.parse(Buffer.concat(parts).toString()))
  } finally {
    unwatch()
    signal.removeEventListener('abort', kill)
    kill()
  }
}

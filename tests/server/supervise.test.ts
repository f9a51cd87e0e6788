import { fork } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { isAlive } from '../../server/postgres/postmaster.ts'
import { supervise } from '../../server/scripts/start/supervise.ts'
import { waitFor } from '../support/wait-for.ts'

describe('a supervised process', () => {
  let folder: string
  let script: string

  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'sheafbook-supervise-'))
    script = join(folder, 'process.mjs')
    // Says its number, and ends in order when asked.
    writeFileSync(
      script,
      `setInterval(() => undefined, 1000)\nprocess.on('SIGTERM', () => { console.log('ended in order'); process.exit(0) })\nconsole.log("pid", process.pid)\n`,
    )
  })
  afterAll(() => rmSync(folder, { recursive: true, force: true }))

  const pidsIn = (log: string) => [...readFileSync(log, 'utf8').matchAll(/pid (\d+)/g)].map((match) => Number(match[1]))

  it('is started again when it was killed, and that is said', async () => {
    const log = join(folder, 'killed.log')
    const said: string[] = []
    const supervised = supervise({ name: 'server', script, env: process.env, logFile: log, say: (line) => said.push(line) })
    const [first = 0] = await waitFor(() => pidsIn(log).length === 1 && pidsIn(log), { what: 'the first start' })
    process.kill(first, 'SIGKILL')
    const [, second = 0] = await waitFor(() => pidsIn(log).length === 2 && pidsIn(log), { what: 'the second start' })
    expect(said).toEqual([expect.stringContaining('The server ended (SIGKILL); it is started again in 0.5 s.')])
    expect(supervised.falls()).toBe(1)
    await supervised.stop()
    expect(isAlive(second)).toBe(false)
  })

  it('ends in order when it is stopped, and stays ended', async () => {
    const log = join(folder, 'stopped.log')
    const said: string[] = []
    const supervised = supervise({ name: 'worker', script, env: process.env, logFile: log, say: (line) => said.push(line) })
    await waitFor(() => pidsIn(log).length === 1, { what: 'the start' })
    await supervised.stop()
    expect(supervised.lastWords()).toContain('ended in order')
    expect(said).toEqual([])
  })

  it('ends in order when whoever supervises it is gone', async () => {
    const child = fork(script, {
      execArgv: ['--import', './server/scripts/start/end-with-parent.mjs'],
      stdio: ['ignore', 'pipe', 'pipe', 'ipc'],
    })
    let printed = ''
    child.stdout?.on('data', (piece: Buffer) => {
      printed += piece.toString()
    })
    await waitFor(() => printed.includes('pid'), { what: 'the start' })
    child.disconnect()
    await waitFor(() => child.exitCode !== null, { what: 'the end' })
    expect(printed).toContain('ended in order')
  })
})

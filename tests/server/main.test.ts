import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createTestDatabase, type TestDatabase } from '../support/database.ts'
import { waitFor } from '../support/wait-for.ts'

describe('the server’s process', () => {
  let database: TestDatabase
  let folder: string
  const started: ChildProcess[] = []
  beforeAll(async () => {
    database = await createTestDatabase()
    folder = await mkdtemp(join(tmpdir(), 'sheafbook-main-'))
  })
  afterAll(async () => {
    for (const child of started) if (child.exitCode === null) child.kill('SIGKILL')
    await database.close()
    await rm(folder, { recursive: true, force: true })
  })

  function start(env: Record<string, string>) {
    const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
      env: { PATH: process.env.PATH, ...env },
      stdio: ['ignore', 'pipe', 'pipe'],
    })
    started.push(child)
    const said = { out: '', err: '' }
    child.stdout.on('data', (part) => {
      said.out += part
    })
    child.stderr.on('data', (part) => {
      said.err += part
    })
    return { child, said }
  }

  it('listens, answers, and ends in order when it is asked to', async () => {
    const { child, said } = start({
      DATABASE_URL: database.url,
      SESSION_SECRET: 'a secret that signs the cookies of tests only',
      STORAGE_DIR: folder,
      PORT: '0',
    })
    const port = await waitFor(() => /"port":(\d+)/.exec(said.out)?.[1], { what: 'the server to listen', deadline_ms: 40_000 })
    const health = await fetch(`http://127.0.0.1:${port}/api/health`)
    expect([health.status, await health.json()]).toEqual([200, { state: 'ready' }])
    const began = Date.now()
    child.kill('SIGTERM')
    const [code] = await once(child, 'exit')
    expect(code).toBe(0)
    expect(Date.now() - began).toBeLessThan(20_000)
    expect(said.err).toBe('')
  })

  it('names every setting it cannot use, and does not start', async () => {
    const { child, said } = start({ DATABASE_URL: 'mysql://elsewhere', PORT: '-1' })
    const [code] = await once(child, 'close')
    expect(code).toBe(1)
    for (const name of ['DATABASE_URL', 'SESSION_SECRET', 'PORT']) expect(said.err).toContain(name)
  })
})

import { chmodSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { isAlive } from '../../server/postgres/postmaster.ts'
import { type PrivateDatabase, startPrivateDatabase } from '../../server/postgres/private-database.ts'
import { withClient } from '../../server/postgres/roles.ts'
import { drawSecrets } from '../../server/postgres/secrets.ts'
import { waitFor } from '../support/wait-for.ts'

describe('a private cluster', () => {
  const secrets = drawSecrets()
  let folder: string
  let running: PrivateDatabase

  beforeAll(() => {
    folder = mkdtempSync(join(tmpdir(), 'sheafbook-cluster-'))
    // The user postgres must get to its folder inside.
    chmodSync(folder, 0o755)
  })
  afterEach(() => running.cluster.stop())
  afterAll(() => rmSync(folder, { recursive: true, force: true }))

  const start = async (port = 0) => {
    running = await startPrivateDatabase({ dataDir: join(folder, 'pg'), secrets, port })
    return running
  }

  it('keeps what was committed over a stop and a start', async () => {
    const first = await start()
    await withClient(first.ownerUrl, (owner) => owner.query('CREATE TABLE kept AS SELECT 42 AS answer'))
    await first.cluster.stop()
    expect(isAlive(first.cluster.pid)).toBe(false)
    const second = await start()
    const kept = await withClient(second.ownerUrl, (owner) => owner.query('SELECT answer FROM kept'))
    expect(kept.rows).toEqual([{ answer: 42 }])
  })

  it('is taken over when whoever started it was killed', async () => {
    const first = await start()
    const second = await start()
    expect([second.cluster.pid, second.cluster.port]).toEqual([first.cluster.pid, first.cluster.port])
  })

  it('starts again after it was killed, whatever process has its number by now', async () => {
    const first = await start()
    process.kill(first.cluster.pid, 'SIGKILL')
    await waitFor(() => !isAlive(first.cluster.pid), { what: 'the end of the postmaster' })
    // Our own number stands for a stranger that was given the dead postmaster's.
    writeFileSync(join(folder, 'pg', 'postmaster.pid'), [process.pid, join(folder, 'pg'), 0, first.cluster.port, ''].join('\n'))
    const second = await start()
    expect(await withClient(second.appUrl, async (app) => (await app.query('SELECT 1 AS one')).rows)).toEqual([{ one: 1 }])
  })

  it('takes another port when the wanted one is busy', async () => {
    const stranger = createServer()
    const busy = await new Promise<number>((resolve) => {
      stranger.listen(0, '127.0.0.1', () => resolve((stranger.address() as { port: number }).port))
    })
    const database = await start(busy)
    expect(database.cluster.port).not.toBe(busy)
    stranger.close()
  })

  it('made with other secrets says which file is missing', async () => {
    await start()
    await running.cluster.stop()
    const attempt = startPrivateDatabase({ dataDir: join(folder, 'pg'), secrets: drawSecrets() })
    await expect(attempt).rejects.toThrow('it was made with another secrets.json')
    expect(isAlive(running.cluster.pid)).toBe(false)
  })

  it('lets nobody in without the password', async () => {
    const database = await start()
    const url = new URL(database.appUrl)
    url.password = 'guessed'
    await expect(withClient(url.href, (client) => client.query('SELECT 1'))).rejects.toThrow('password authentication failed')
  })
})

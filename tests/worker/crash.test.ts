import { type ChildProcess, spawn } from 'node:child_process'
import { afterAll, afterEach, beforeAll, expect, it } from 'vitest'
import { waitFor } from '../support/wait-for.ts'
import { createSetting, type Setting } from './setting.ts'

let setting: Setting
let running: ChildProcess[] = []

beforeAll(async () => {
  setting = await createSetting()
  // Production waits 30 s (server/db/queue.test.ts has the sum); the mechanism is the same at 2 s.
  await setting.expireAfter(2)
})
afterEach(() => {
  for (const child of running) child.kill('SIGKILL')
  running = []
})
afterAll(() => setting.close())

/** A worker process, and what it said. */
function startProcess(...args: string[]) {
  const child = spawn(process.execPath, ['--import', 'tsx', 'tests/worker/crash-worker.ts', ...args], {
    env: { ...process.env, DATABASE_URL: setting.database.url },
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  running.push(child)
  let said = ''
  child.stdout.on('data', (part: Buffer) => {
    said += part.toString()
  })
  return { child, said: () => said, ended: new Promise<void>((resolve) => child.on('exit', () => resolve())) }
}

it('a page whose worker is killed while reading is taken up by another', async () => {
  const first = startProcess('hang')
  const pageId = await setting.addPage('hang.jpg')
  await waitFor(() => first.said().includes('reading hang.jpg'), { what: 'the first worker to read', deadline_ms: 30_000 })
  first.child.kill('SIGKILL')
  await first.ended
  expect(await setting.pageOf(pageId)).toMatchObject({ state: 'being read', attempts: 1 })
  startProcess()
  await setting.waitForState(pageId, 'read', 30_000)
  expect((await setting.pageOf(pageId)).attempts).toBe(2)
})

it('a file that kills its workers kills three, then is an unreadable sheet with a reason, and other pages are read', async () => {
  const poison = await setting.addPage('poison.jpg')
  const good = await setting.addPage('good.jpg')
  let deaths = 0
  let over = false
  // A supervisor: whenever the worker is gone, it starts the next.
  const supervise = async () => {
    while (!over) {
      const { child, ended } = startProcess()
      await ended
      if (child.signalCode === 'SIGKILL' && !over) deaths += 1
    }
  }
  const supervised = supervise()
  await setting.waitForState(poison, 'unreadable', 45_000)
  await setting.waitForState(good, 'read', 20_000)
  over = true
  for (const child of running) child.kill('SIGKILL')
  await supervised
  expect(deaths).toBe(3)
  const { sheetId } = await setting.pageOf(poison)
  const rows = await setting.source.query('SELECT state, reason FROM sheets WHERE id = $1', [sheetId])
  expect(rows).toEqual([{ state: 'unreadable', reason: expect.stringContaining('The file is kept.') }])
})

import { type ChildProcess, spawn } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { mkdtemp, rm, stat } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import sharp from 'sharp'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { type DataSource, openDatabase } from '../../server/db/database.ts'
import { freePort } from '../../server/postgres/free-port.ts'
import type { Upload } from '../../shared/schemas/upload.ts'
import { createUser } from '../builders/user.ts'
import { createAgent, type TestAgent } from '../support/agent.ts'
import { createTestDatabase, type TestDatabase } from '../support/database.ts'
import { waitFor } from '../support/wait-for.ts'

const CYCLES = 4
const FILES = 12

let database: TestDatabase
let source: DataSource
let folder: string
let port: number
let server: ChildProcess
let agent: TestAgent

beforeAll(async () => {
  database = await createTestDatabase()
  source = await openDatabase(database.url, { poolSize: 2 })
  folder = await mkdtemp(join(tmpdir(), 'sheafbook-door-'))
  port = await freePort()
  agent = createAgent(`http://127.0.0.1:${port}`)
  await start()
  const { email } = await createUser(source.manager, { role: 'clerk' })
  expect((await agent.signIn(email)).status).toBe(200)
})
afterAll(async () => {
  await kill()
  await source.destroy()
  await database.close()
  await rm(folder, { recursive: true, force: true })
})

async function start(): Promise<void> {
  server = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    env: {
      ...process.env,
      DATABASE_URL: database.url,
      STORAGE_DIR: folder,
      SESSION_SECRET: 'a secret that signs the cookies of tests only',
      PORT: String(port),
      LOG_LEVEL: 'silent',
    },
    stdio: 'ignore',
  })
  await waitFor(async () => (await agent.get('/health')).status === 200, { what: 'the server to answer', deadline_ms: 40_000 })
}

async function kill(): Promise<void> {
  const ended = new Promise((resolve) => server.once('exit', resolve))
  server.kill('SIGKILL')
  await ended
}

const photo = () =>
  sharp(randomBytes(64 * 48 * 3), { raw: { width: 64, height: 48, channels: 3 } })
    .jpeg()
    .toBuffer()

async function send(bytes: Buffer): Promise<Upload | null> {
  const form = new FormData()
  form.append('files', new File([bytes.slice()], 'sheet.jpg'))
  const answer = await agent.send('/uploads', form).catch(() => null)
  return answer?.status === 201 ? (answer.body as { uploads: Upload[] }).uploads[0]! : null
}

/** The upload of these bytes with everything an answer promises: one row, its file as long as it was, one page, one job. */
async function promised(sha256: string) {
  const rows: Array<{ key: string; bytes: number; pages: number; jobs: number }> = await source.query(
    `SELECT u.storage_key AS key, u.bytes, (SELECT count(*) FROM pages WHERE upload_id = u.id) AS pages,
       (SELECT count(*) FROM pgboss.job j JOIN pages p ON j.data->>'pageId' = p.id::text WHERE p.upload_id = u.id) AS jobs
     FROM uploads u WHERE sha256 = $1`,
    [sha256],
  )
  return Promise.all(
    rows.map(async ({ key, bytes, pages, jobs }) => ({
      whole: (await stat(join(folder, key))).size === Number(bytes),
      pages: Number(pages),
      jobs: Number(jobs),
    })),
  )
}

it('what the door answered for is there after it was killed, and what it did not answer for comes in once when sent again', async () => {
  const sent: Array<{ bytes: Buffer; answer: Upload | null }> = []
  for (let cycle = 0; cycle < CYCLES; cycle += 1) {
    // The rate of uploads is another test's matter.
    await source.query("UPDATE uploads SET received_at = now() - interval '2 minutes'")
    const photos = await Promise.all(Array.from({ length: FILES }, photo))
    let answered = 0
    const posts = photos.map(async (bytes) => {
      const answer = await send(bytes)
      if (answer) answered += 1
      sent.push({ bytes, answer })
    })
    // Killed after a different number of answers each time, with the others under way.
    await waitFor(() => answered > cycle * 2, { what: 'some answers', every_ms: 1 })
    await kill()
    await Promise.all(posts)
    await start()
  }
  const answers = sent.filter(({ answer }) => answer !== null)
  expect(answers.length).toBeLessThan(sent.length)
  for (const { answer } of answers) expect(await promised(answer!.sha256)).toEqual([{ whole: true, pages: 1, jobs: 1 }])
  await source.query("UPDATE uploads SET received_at = now() - interval '2 minutes'")
  for (const { bytes, answer } of sent) {
    const again = await send(bytes)
    expect(again).not.toBeNull()
    if (answer) expect(again).toMatchObject({ id: answer.id, seenBefore: true })
    expect(await promised(again!.sha256)).toEqual([{ whole: true, pages: 1, jobs: 1 }])
  }
})

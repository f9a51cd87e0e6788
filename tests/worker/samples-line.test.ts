import { type ChildProcess, spawn } from 'node:child_process'
import { readFile } from 'node:fs/promises'
import { buffer } from 'node:stream/consumers'
import PDFDocument from 'pdfkit'
import sharp from 'sharp'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { isAlive } from '../../server/postgres/postmaster.ts'
import type { Sheet } from '../../shared/schemas/sheet.ts'
import type { Upload } from '../../shared/schemas/upload.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { waitFor } from '../support/wait-for.ts'

let server: TestServer
let worker: ChildProcess
let workerSaid = ''
let clerk: TestAgent

beforeAll(async () => {
  server = await startTestServer()
  clerk = await server.signIn('clerk')
  const { store, databaseUrl } = server.deps.settings
  if (store.kind !== 'folder') throw new Error('these tests keep files in a folder')
  worker = spawn(process.execPath, ['--import', 'tsx', 'worker/main.ts'], {
    env: { ...process.env, DATABASE_URL: databaseUrl, STORAGE_DIR: store.dir, LOG_LEVEL: 'warn' },
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  worker.stdout?.on('data', (part: Buffer) => {
    workerSaid += part.toString()
  })
})
afterAll(async () => {
  worker.kill('SIGKILL')
  await server.close()
})

/** A page of a scan on which nothing of ours stands. */
async function emptyScan(): Promise<File> {
  const pdf = new PDFDocument({ size: 'A4' })
  pdf.fontSize(30).text('Minutes of the meeting')
  pdf.end()
  return new File([await buffer(pdf)], 'minutes.pdf')
}

async function send(sent: string | File): Promise<Upload> {
  const path = typeof sent === 'string' ? sent : sent.name
  const form = new FormData()
  form.append('files', typeof sent === 'string' ? new File([await readFile(sent)], sent.split('/').at(-1)!) : sent)
  const [upload] = ((await clerk.send('/uploads', form)).body as { uploads: Upload[] }).uploads
  await waitFor(
    async () => ['done', 'not accepted'].includes(((await clerk.get(`/uploads/${upload!.id}`)).body as Upload).state),
    { what: `${path} to be read (${workerSaid})`, deadline_ms: 50_000 },
  )
  return (await clerk.get(`/uploads/${upload!.id}`)).body as Upload
}

it('a flat scan is read to the desk: its sheet waits, its clear readings are what was written, its page can be seen', async () => {
  const upload = await send('samples/flat-scan/flat-scan.jpg')
  const [page] = upload.pages
  expect(page).toMatchObject({ state: 'read', sheet: { state: expect.stringMatching(/waiting|settled/) } })
  const truth = JSON.parse(await readFile('samples/flat-scan/flat-scan.truth.json', 'utf8'))
  const readings: Array<{ key: string; value: unknown; state: string }> = await server.deps.source.query(
    "SELECT key, value, state FROM readings WHERE sheet_id = $1 AND origin = 'ink'",
    [page!.sheet!.id],
  )
  const clear = readings.filter(({ key, state }) => state === 'clear' && typeof truth.readings[key] === 'number')
  expect(clear.length).toBeGreaterThan(20)
  expect(clear.filter(({ key, value }) => value !== truth.readings[key])).toEqual([])
  const picture = await clerk.get(`/pages/${page!.id}/picture`)
  expect(picture.headers.get('content-type')).toBe('image/jpeg')
  expect(await sharp(picture.bytes).metadata()).toMatchObject({ format: 'jpeg', width: 1240, height: 1754 })
})

it('a picture whose corners a clerk sets is read anew at that place', async () => {
  const bytes = await sharp(await readFile('samples/flat-scan/flat-scan.jpg'))
    .jpeg({ quality: 85 })
    .toBuffer()
  const upload = await send(new File([bytes], 'by-hand.jpg'))
  const id = upload.pages[0]!.sheet!.id
  const { width, height } = await sharp(bytes).metadata()
  const before = (await clerk.get(`/sheets/${id}`)).body as Sheet
  const answer = await clerk.post(`/sheets/${id}/place`, {
    version: before.version,
    layout: 'tillage',
    layoutVersion: 1,
    sheetCode: before.code,
    corners: [
      [0, 0],
      [width, 0],
      [width, height],
      [0, height],
    ],
  })
  expect(answer).toMatchObject({ status: 200, body: { state: 'being read' } })
  await waitFor(async () => ((await clerk.get(`/sheets/${id}`)).body as Sheet).state !== 'being read', {
    what: 'the page to be read again',
    deadline_ms: 50_000,
  })
  const after = (await clerk.get(`/sheets/${id}`)).body as Sheet
  expect(after.readings.filter((reading) => reading.value !== null).length).toBeGreaterThan(40)
  expect((await clerk.get(`/pages/${upload.pages[0]!.id}/picture`)).status).toBe(200)
})

it('a scan of three pages becomes three sheets', async () => {
  const upload = await send('samples/three-pages/three-pages.pdf')
  expect(upload.pages.map((page) => page.number)).toEqual([1, 2, 3])
  expect(upload.pages.map((page) => page.state)).toContain('read')
  expect(new Set(upload.pages.map((page) => page.sheet!.id)).size).toBe(3)
})

it('a scanned page that is no sheet can be looked at where its corners are set, though its file is a PDF', async () => {
  const upload = await send(await emptyScan())
  expect(upload.pages[0]).toMatchObject({ state: 'take again' })
  const { status, headers, bytes } = await clerk.get(`/pages/${upload.pages[0]!.id}/original?as=picture`)
  expect([status, headers.get('content-type')]).toEqual([200, 'image/jpeg'])
  // A4 at 220 dpi, as the reader sees it: 210 mm / 25.4 x 220.
  expect((await sharp(bytes).metadata()).width).toBeCloseTo(1819, -1)
  const original = await clerk.get(`/pages/${upload.pages[0]!.id}/original`)
  expect(original.headers.get('content-type')).toBe('application/pdf')
})

it('a picture with nothing to read is answered with what to do', async () => {
  const upload = await send('samples/nothing/nothing.jpg')
  expect(upload.pages).toMatchObject([{ state: 'take again', takeAgain: { advice: expect.stringMatching(/\w{3,}/) } }])
})

it('a worker told to end does so in order within 20 seconds, and takes its reading process with it', async () => {
  const children = (await readFile(`/proc/${worker.pid}/task/${worker.pid}/children`, 'utf8')).trim().split(' ').map(Number)
  expect(children.filter(Boolean).length).toBeGreaterThan(0)
  const told = Date.now()
  const ended = new Promise((resolve) => worker.once('exit', resolve))
  worker.kill('SIGTERM')
  expect(await ended).toBe(0)
  // G-R13: 20 s from the signal to the end.
  expect(Date.now() - told).toBeLessThan(20_000)
  await waitFor(() => children.filter(Boolean).every((pid) => !isAlive(pid)), { what: 'the reading process to end' })
})

import { randomBytes } from 'node:crypto'
import { request } from 'node:http'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { checkFile } from '../../server/features/uploads/check-file.ts'
import { writeFormCsv } from '../../server/print/form-csv.ts'
import { writeFormXlsx } from '../../server/print/form-xlsx.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import { type Upload, uploadSchema } from '../../shared/schemas/upload.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { type HostileFile, hostileFiles } from './hostile-files.ts'

let server: TestServer
let clerk: TestAgent

beforeAll(async () => {
  server = await startTestServer()
  clerk = await server.signIn('clerk')
})
afterAll(() => server.close())

interface Named {
  name: string
  bytes: Uint8Array
}

async function sendAs(agent: TestAgent, files: Named[], fields: Record<string, string> = {}) {
  const form = new FormData()
  for (const [key, value] of Object.entries(fields)) form.append(key, value)
  for (const { name, bytes } of files) form.append('files', new File([bytes.slice()], name))
  return agent.send('/uploads', form)
}

async function accepted(agent: TestAgent, files: Named[], fields?: Record<string, string>): Promise<Upload[]> {
  const { status, body } = await sendAs(agent, files, fields)
  expect(status, JSON.stringify(body)).toBe(201)
  return (body as { uploads: unknown[] }).uploads.map((upload) => uploadSchema.parse(upload))
}

/** A small picture that nobody sent before. */
const photo = () =>
  sharp(randomBytes(64 * 48 * 3), { raw: { width: 64, height: 48, channels: 3 } })
    .jpeg()
    .toBuffer()

const count = async (sql: string, values: unknown[] = []) =>
  Number((await server.deps.source.query(`SELECT count(*) AS n FROM ${sql}`, values))[0].n)
const jobsOf = (uploadId: string) =>
  count(
    "pgboss.job WHERE (data->>'uploadId' = $1) OR data->>'pageId' IN (SELECT id::text FROM pages WHERE upload_id = $1::uuid)",
    [uploadId],
  )

describe('a file at the door', () => {
  it('becomes a kept file, a page and a job', async () => {
    const bytes = await photo()
    const [upload] = await accepted(clerk, [{ name: 'Feld\u00fcbung \u0905.jpg', bytes }])
    expect(upload).toMatchObject({
      fileName: 'Feld\u00fcbung \u0905.jpg',
      kind: 'jpeg',
      bytes: bytes.length,
      state: 'arrived',
      reason: null,
      seenBefore: false,
    })
    expect(upload!.pages).toMatchObject([{ number: 1, state: 'arrived', sheet: null }])
    expect(await jobsOf(upload!.id)).toBe(1)
    const original = await clerk.get(`/pages/${upload!.pages[0]!.id}/original`)
    expect(original.bytes.equals(bytes)).toBe(true)
    expect(original.headers.get('content-disposition')).toMatch(/^attachment/)
    expect(original.headers.get('x-content-type-options')).toBe('nosniff')
  })

  it('of each kind is told by its content, and several come at once', async () => {
    const picture = sharp(await photo())
    const files = [
      { name: 'a.jpg', bytes: await picture.png().toBuffer() },
      { name: 'b', bytes: await picture.webp().toBuffer() },
      { name: 'c.tif', bytes: await picture.tiff().toBuffer() },
      { name: 'd.xlsx', bytes: await writeFormXlsx(tillage1) },
      { name: 'e.csv', bytes: Buffer.from(writeFormCsv(tillage1)) },
    ]
    const uploads = await accepted(clerk, files)
    expect(uploads.map((upload) => [upload.kind, upload.state])).toEqual([
      ['png', 'arrived'],
      ['webp', 'arrived'],
      ['tiff', 'arrived'],
      ['xlsx', 'arrived'],
      ['csv', 'arrived'],
    ])
    expect(await Promise.all(uploads.map((upload) => jobsOf(upload.id)))).toEqual([1, 1, 1, 1, 1])
  })

  it('that came before is answered with its first coming, whatever its name now', async () => {
    const bytes = await photo()
    const [first] = await accepted(clerk, [{ name: 'one.jpg', bytes }])
    const [second] = await accepted(await server.signIn('admin'), [{ name: 'two.jpg', bytes }])
    expect(second).toEqual({ ...first, seenBefore: true })
    expect(await jobsOf(first!.id)).toBe(1)
  })

  it('sent fifty times at once is one upload, one kept file and one job, with fifty equal answers', async () => {
    const bytes = await photo()
    const admin = await server.signIn('admin')
    const answers = await Promise.all(Array.from({ length: 50 }, () => accepted(admin, [{ name: 'sheet.jpg', bytes }])))
    expect(new Set(answers.map(([upload]) => upload!.id)).size).toBe(1)
    expect(answers.filter(([upload]) => !upload!.seenBefore)).toHaveLength(1)
    expect(await count('uploads WHERE sha256 = $1', [answers[0]![0]!.sha256])).toBe(1)
    expect(await jobsOf(answers[0]![0]!.id)).toBe(1)
  })

  it('that is good comes in beside one that is not', async () => {
    const uploads = await accepted(clerk, [
      { name: 'empty.jpg', bytes: Buffer.alloc(0) },
      { name: 'good.jpg', bytes: await photo() },
    ])
    expect(uploads.map((upload) => upload.state)).toEqual(['not accepted', 'arrived'])
  })

  it('stands in the trail with who sent it', async () => {
    const sender = await server.signIn('demonstrator')
    const [upload] = await accepted(sender, [{ name: 'mine.jpg', bytes: await photo() }])
    const rows = await server.deps.source.query('SELECT who, action FROM trail WHERE subject_id = $1', [upload!.id])
    expect(rows).toEqual([{ who: sender.user.name, action: 'send in' }])
  })
})

describe('a hostile file', () => {
  let files: HostileFile[]
  let sender: TestAgent
  beforeAll(async () => {
    files = await hostileFiles()
    sender = await server.signIn('clerk')
  })

  it('is refused with its reason, each of at least thirty', async () => {
    expect(files.length).toBeGreaterThanOrEqual(30)
    for (const { what, name, bytes, reason } of files) {
      const [upload] = await accepted(sender, [{ name, bytes }])
      expect({ what, state: upload!.state }, upload!.reason ?? '').toEqual({ what, state: 'not accepted' })
      expect(upload!.reason, what).toMatch(reason)
      expect(upload!.reason, what).toMatch(/Nothing was kept\. \p{Lu}/u)
    }
  })

  it('costs less than a second and 100 MB to refuse, once it has arrived', async () => {
    for (const { what, name, bytes } of files) {
      const [started, before] = [performance.now(), process.memoryUsage.rss()]
      expect((await checkFile(bytes, name)).refusal, what).not.toBeNull()
      expect(performance.now() - started, what).toBeLessThan(1_000)
      expect(process.memoryUsage.rss() - before, what).toBeLessThan(100_000_000)
    }
  })

  it('leaves no bytes behind and makes no job', async () => {
    const [refused] = await accepted(sender, [{ name: 'empty.jpg', bytes: Buffer.alloc(0) }])
    expect(await jobsOf(refused!.id)).toBe(0)
    expect(await count("uploads WHERE state = 'not accepted' AND storage_key IS NOT NULL")).toBe(0)
  })
})

describe('the door', () => {
  it('refuses a request that is larger than it may be before reading it', async () => {
    const headers = { 'Content-Type': 'multipart/form-data; boundary=x', 'Content-Length': '5000000000', 'X-Sheafbook': '1' }
    const status = await new Promise((resolve, reject) => {
      const asked = request(`${server.url}/api/uploads`, { method: 'POST', headers: { ...headers, Cookie: clerk.cookie } })
      asked.on('response', (answer) => {
        resolve(answer.statusCode)
        asked.destroy()
      })
      asked.on('error', reject)
      asked.flushHeaders()
    })
    expect(status).toBe(413)
  })

  it('refuses a request without a file, and one that breaks off', async () => {
    expect((await sendAs(clerk, [])).status).toBe(400)
    const body = '--x\r\nContent-Disposition: form-data; name="files"; filename="a.jpg"\r\n\r\nhalf a file'
    const response = await fetch(`${server.url}/api/uploads`, {
      method: 'POST',
      headers: { 'X-Sheafbook': '1', Cookie: clerk.cookie, 'Content-Type': 'multipart/form-data; boundary=x' },
      body,
    })
    expect([response.status, await response.json()]).toMatchObject([
      400,
      { error: { message: expect.stringContaining('did not arrive whole') } },
    ])
  })

  it('asks for patience after sixty files in a minute', async () => {
    const sender = await server.signIn('demonstrator')
    await server.deps.source.query(
      `INSERT INTO uploads (uploaded_by, file_name, bytes, sha256, state) SELECT $1, 'x', 0, 'x', 'not accepted' FROM generate_series(1, 60)`,
      [sender.user.id],
    )
    const { status, headers } = await sendAs(sender, [{ name: 'one.jpg', bytes: await photo() }])
    expect([status, headers.get('retry-after')]).toEqual([429, '60'])
  })

  it('shows a demonstrator their own files only', async () => {
    const [mine, other] = [await server.signIn('demonstrator'), await server.signIn('demonstrator')]
    const [upload] = await accepted(mine, [{ name: 'mine.jpg', bytes: await photo() }])
    const paths = [`/uploads/${upload!.id}`, `/pages/${upload!.pages[0]!.id}/original`]
    expect(await Promise.all(paths.map(async (path) => (await mine.get(path)).status))).toEqual([200, 200])
    expect(await Promise.all(paths.map(async (path) => (await other.get(path)).status))).toEqual([404, 404])
    const { body } = await other.get('/uploads')
    expect(body).toEqual({ uploads: [] })
  })

  it('takes an answer to a sheet only from whom it belongs to', async () => {
    const mine = await server.signIn('demonstrator')
    const [{ id }] = await server.deps.source.query(
      "INSERT INTO sheets (state, owner_id) VALUES ('sent back', $1) RETURNING id",
      [mine.user.id],
    )
    const [upload] = await accepted(mine, [{ name: 'answer.jpg', bytes: await photo() }], { forSheet: id })
    expect(await count('uploads WHERE id = $1 AND for_sheet_id = $2', [upload!.id, id])).toBe(1)
    const other = await server.signIn('demonstrator')
    expect((await sendAs(other, [{ name: 'answer.jpg', bytes: await photo() }], { forSheet: id })).status).toBe(404)
  })
})

import { randomBytes } from 'node:crypto'
import exceljs from 'exceljs'
import PDFDocument from 'pdfkit'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { writeFormXlsx } from '../../server/print/form-xlsx.ts'
import { FORM_COLUMNS, FORM_SHEET } from '../../shared/layouts/form.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Upload } from '../../shared/schemas/upload.ts'
import { runParser } from '../../worker/child/run-parser.ts'
import { pageReadJob } from '../../worker/jobs/page-read.job.ts'
import { uploadSplitJob } from '../../worker/jobs/upload-split.job.ts'
import { startWorker, type Worker } from '../../worker/start-worker.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { waitFor } from '../support/wait-for.ts'
import { noneOf, silent } from './setting.ts'

let server: TestServer
let worker: Worker | null
let clerk: TestAgent
const pagesRead: Array<{ fileName: string; page: number }> = []

beforeAll(async () => {
  server = await startTestServer()
  clerk = await server.signIn('clerk')
  worker = await startWorker(
    {
      databaseUrl: server.deps.settings.databaseUrl,
      log: silent,
      handlers: ({ source, boss }) => [
        ...noneOf('mail-send', 'webhook-send'),
        uploadSplitJob({ source, boss, files: server.deps.files, parse: runParser }),
        pageReadJob({
          source,
          files: server.deps.files,
          reader: {
            read: async ({ fileName, page }) => {
              pagesRead.push({ fileName, page })
              return { outcome: { kind: 'take again', code: 'no sheet', advice: 'No sheet is in this picture.' }, picture: null }
            },
            close: async () => undefined,
          },
        }),
      ],
    },
    new AbortController().signal,
  )
})
afterAll(async () => {
  await worker?.stop(5_000)
  await server.close()
})

async function send(name: string, bytes: Uint8Array): Promise<Upload> {
  const form = new FormData()
  form.append('files', new File([bytes.slice()], name))
  const { body } = await clerk.send('/uploads', form)
  const [upload] = (body as { uploads: Upload[] }).uploads
  const final = await waitFor(
    async () => {
      const found = (await clerk.get(`/uploads/${upload!.id}`)).body as Upload
      return ['done', 'not accepted'].includes(found.state) && found
    },
    { what: `${name} to be read`, deadline_ms: 40_000 },
  )
  return final as Upload
}

async function filledForm(): Promise<Uint8Array> {
  const workbook = new exceljs.Workbook()
  await workbook.xlsx.load((await writeFormXlsx(tillage1)).buffer as ArrayBuffer)
  const sheet = workbook.getWorksheet(FORM_SHEET)!
  const values: Record<string, Array<string | number>> = {
    jar_start_ml: [4800, 4600],
    'depth_cm[1]': ['15,5', 14.5],
    area_unit: ['ha', 'ha'],
  }
  sheet.eachRow((row) => {
    const typed = values[String(row.getCell(FORM_COLUMNS.key).value)] ?? []
    for (const [i, value] of typed.entries()) row.getCell(FORM_COLUMNS.firstValue + i).value = value
  })
  return new Uint8Array((await workbook.xlsx.writeBuffer()) as ArrayBuffer)
}

const scan = (pages: number) =>
  new Promise<Buffer>((resolve) => {
    const pdf = new PDFDocument({ size: 'A4', autoFirstPage: false })
    const parts: Buffer[] = []
    pdf.on('data', (part: Buffer) => parts.push(part))
    pdf.on('end', () => resolve(Buffer.concat(parts)))
    for (let i = 0; i < pages; i += 1) pdf.addPage().text(`page ${i + 1}`)
    pdf.end()
  })

describe('from the door to the desk', () => {
  it('a workbook with two runs becomes two sheets, each value with its cell and what is doubtful in doubt', async () => {
    const upload = await send('form.xlsx', await filledForm())
    expect(upload).toMatchObject({ kind: 'xlsx', state: 'done' })
    expect(upload.pages.map((page) => [page.number, page.state, page.sheet?.state])).toEqual([
      [1, 'read', 'waiting'],
      [2, 'read', 'waiting'],
    ])
    const readings = await server.deps.source.query(
      `SELECT key, value, state, origin, cell_ref AS "cellRef" FROM readings
       WHERE sheet_id = $1 AND key IN ('jar_start_ml', 'depth_cm[1]', 'area_unit') ORDER BY key`,
      [upload.pages[0]!.sheet!.id],
    )
    expect(readings).toMatchObject([
      { key: 'area_unit', value: 'ha', state: 'clear', origin: 'spreadsheet' },
      { key: 'depth_cm[1]', value: null, state: 'in doubt' },
      { key: 'jar_start_ml', value: 4800, state: 'clear', cellRef: expect.stringMatching(/^Runs!D\d+$/) },
    ])
  })

  it('a CSV form becomes a sheet a row', async () => {
    const upload = await send('runs.csv', Buffer.from('layout,version,jar_start_ml [mL]\r\ntillage,1,4800\r\ntillage,1,4400\r\n'))
    expect(upload.pages).toHaveLength(2)
    expect(upload.pages.every((page) => page.state === 'read')).toBe(true)
  })

  it('a season of five hundred runs in one file becomes five hundred pages', async () => {
    const lines = Array.from({ length: 500 }, (_, i) => `tillage,1,${4000 + i}\r\n`)
    const form = new FormData()
    form.append('files', new File([`layout,version,jar_start_ml [mL]\r\n${lines.join('')}`], 'season.csv'))
    const [upload] = ((await clerk.send('/uploads', form)).body as { uploads: Upload[] }).uploads
    await waitFor(async () => ((await clerk.get(`/uploads/${upload!.id}`)).body as Upload).pages.length === 500, {
      what: 'the pages',
      deadline_ms: 30_000,
    })
    const [first] = await server.deps.source.query(
      "SELECT block->'values'->'jar_start_ml'->'value' AS value FROM pages WHERE upload_id = $1 AND number = 1",
      [upload!.id],
    )
    expect(first.value).toBe(4000)
    // Nobody in a field waits behind them: a photo is read before the rest of the season.
    const photo = await sharp(randomBytes(60 * 90 * 3), { raw: { width: 60, height: 90, channels: 3 } })
      .jpeg()
      .toBuffer()
    await send('field.jpg', photo)
    const [left] = await server.deps.source.query(
      "SELECT count(*) AS n FROM pgboss.job WHERE name = 'page-read' AND state < 'active'",
    )
    expect(Number(left.n)).toBeGreaterThan(0)
    // They are not what this test is about, and would keep the worker busy for the others.
    await server.deps.source.query("DELETE FROM pgboss.job WHERE name = 'page-read' AND state < 'active'")
  })

  it('a scan of three pages becomes three pages, each read by itself', async () => {
    const upload = await send('scan.pdf', await scan(3))
    expect(upload).toMatchObject({ kind: 'pdf', state: 'done' })
    expect(upload.pages.map((page) => page.state)).toEqual(['take again', 'take again', 'take again'])
    expect(upload.pages[0]!.takeAgain).toEqual({ code: 'no sheet', advice: 'No sheet is in this picture.' })
    const read = pagesRead.filter(({ fileName }) => fileName === 'scan.pdf').map(({ page }) => page)
    expect(read.sort()).toEqual([1, 2, 3])
  })

  it('a TIFF becomes a page for each of its pictures', async () => {
    const picture = sharp({ create: { width: 60, height: 90, channels: 3, background: '#fff' } })
    const upload = await send('scan.tif', await picture.tiff().toBuffer())
    expect(upload.pages).toHaveLength(1)
  })

  it('a workbook of somebody else is not accepted once it is opened, and its bytes go', async () => {
    const workbook = new exceljs.Workbook()
    workbook.addWorksheet('Prices').addRow(['plough', 12])
    const upload = await send('prices.xlsx', new Uint8Array((await workbook.xlsx.writeBuffer()) as ArrayBuffer))
    expect(upload).toMatchObject({ state: 'not accepted', pages: [], reason: expect.stringContaining('not a form of ours') })
    expect(upload.reason).toContain('Nothing was kept')
    const rows = await server.deps.source.query('SELECT storage_key AS key FROM uploads WHERE id = $1', [upload.id])
    expect(rows).toEqual([{ key: null }])
  })

  it('a PDF that only looks like one is not accepted once it is opened', async () => {
    const upload = await send('broken.pdf', Buffer.from('%PDF-1.7\nnothing of the kind\n%%EOF\n'))
    expect(upload).toMatchObject({ state: 'not accepted', reason: expect.stringMatching(/damaged.*Nothing was kept/) })
  })
})

describe('a parser', () => {
  const signal = new AbortController().signal
  const script = 'tests/worker/bad-parser.ts'

  it.each(['fills the memory', 'fills buffers', 'never ends', 'dies'])(
    'that %s costs its own process only, and the file is refused',
    async (what) => {
      const answer = await runParser('csv', Buffer.from(what), { signal, script, heap_mb: 64, resident_mb: 400, time_s: 6 })
      expect(answer).toEqual({ kind: 'refused', reason: expect.stringContaining('Nothing was kept') })
    },
  )

  it('is ended with the attempt it works for', async () => {
    const attempt = new AbortController()
    const parsing = runParser('csv', Buffer.from('never ends'), { signal: attempt.signal, script })
    attempt.abort(new Error('the attempt is over'))
    await expect(parsing).rejects.toThrow('the attempt is over')
  })
})

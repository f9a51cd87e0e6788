/** A spreadsheet form of each layout, from the door over the desk into the book: no step knows which sheet it is. */
import exceljs from 'exceljs'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { csvLine } from '../../server/print/csv-text.ts'
import { writeFormXlsx } from '../../server/print/form-xlsx.ts'
import { csvHeading, FORM_COLUMNS, FORM_SHEET, formRows } from '../../shared/layouts/form.ts'
import { haulage1 } from '../../shared/layouts/haulage-1.ts'
import type { Layout } from '../../shared/layouts/layout.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { TrialRecord } from '../../shared/schemas/record.ts'
import type { Entered, Sheet } from '../../shared/schemas/sheet.ts'
import type { Upload } from '../../shared/schemas/upload.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import { runParser } from '../../worker/child/run-parser.ts'
import { pageReadJob } from '../../worker/jobs/page-read.job.ts'
import { uploadSplitJob } from '../../worker/jobs/upload-split.job.ts'
import { startWorker, type Worker } from '../../worker/start-worker.ts'
import { buildRoadRun } from '../builders/haulage.ts'
import { buildReadings } from '../builders/readings.ts'
import { createImplement } from '../builders/register.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { waitFor } from '../support/wait-for.ts'
import { noneOf, silent } from './setting.ts'

let server: TestServer
let worker: Worker | null
let clerk: TestAgent
let demonstratorNumber: number

beforeAll(async () => {
  server = await startTestServer()
  await createGoldenRegisters(server.deps.source)
  await createImplement(server.deps.source.manager, {
    number: 41,
    name: 'tipping trailer',
    operation: 'transport',
    maxDepth_cm: 0,
  })
  clerk = await server.signIn('clerk')
  demonstratorNumber = (await server.signIn('demonstrator')).user.number
  worker = await startWorker(
    {
      databaseUrl: server.deps.settings.databaseUrl,
      log: silent,
      handlers: ({ source, boss }) => [
        ...noneOf('mail-send', 'webhook-send'),
        uploadSplitJob({ source, boss, files: server.deps.files, parse: runParser }),
        pageReadJob({ source, files: server.deps.files, reader: noPictures }),
      ],
    },
    new AbortController().signal,
  )
})
afterAll(async () => {
  await worker?.stop(5_000)
  await server.close()
})

const noPictures = {
  read: async () => {
    throw new Error('no picture was sent')
  },
  close: async () => undefined,
}

/** As a person types it. */
const typed = (value: Readings[string]) => (typeof value === 'boolean' ? (value ? 'yes' : 'no') : (value ?? ''))

function csvOf(layout: Layout, run: Readings): Buffer {
  const rows = formRows(layout)
  const head = ['layout', 'version', ...rows.map(csvHeading)]
  return Buffer.from(csvLine(head) + csvLine([layout.key, layout.version, ...rows.map((row) => typed(run[row.key]))]))
}

async function workbookOf(layout: Layout, run: Readings): Promise<Uint8Array> {
  const workbook = new exceljs.Workbook()
  await workbook.xlsx.load((await writeFormXlsx(layout)).buffer as ArrayBuffer)
  workbook.getWorksheet(FORM_SHEET)!.eachRow((row) => {
    const value = run[String(row.getCell(FORM_COLUMNS.key).value)]
    if (value !== undefined && value !== null) row.getCell(FORM_COLUMNS.firstValue).value = typed(value)
  })
  return new Uint8Array((await workbook.xlsx.writeBuffer()) as ArrayBuffer)
}

async function sheetFrom(name: string, bytes: Uint8Array): Promise<Sheet> {
  const form = new FormData()
  form.append('files', new File([bytes.slice()], name))
  const [sent] = ((await clerk.send('/uploads', form)).body as { uploads: Upload[] }).uploads
  const upload = () => clerk.get(`/uploads/${sent!.id}`).then(({ body }) => body as Upload)
  await waitFor(async () => ['done', 'not accepted'].includes((await upload()).state), {
    what: `${name} to be read`,
    deadline_ms: 100_000,
  })
  return (await clerk.get(`/sheets/${(await upload()).pages[0]!.sheet!.id}`)).body as Sheet
}

async function enter(sheet: Sheet): Promise<TrialRecord> {
  expect(sheet.doubts.filter((doubt) => doubt.severity !== 'note').map(({ rule, text }) => [rule, text])).toEqual([])
  const answer = await clerk.post(`/sheets/${sheet.id}/enter`, { version: sheet.version })
  expect(answer).toMatchObject({ status: 200 })
  return (await clerk.get(`/records/${(answer.body as Entered).recordNumber}`)).body as TrialRecord
}

const head = (day: string): Readings => ({ demonstrator_id: demonstratorNumber, trial_date: day })

test.each([
  ['tillage', 'csv', tillage1, buildReadings, '2026-11-02'],
  ['haulage', 'csv', haulage1, buildRoadRun, '2026-11-03'],
  ['haulage', 'xlsx', haulage1, buildRoadRun, '2026-11-04'],
] as const)(
  'the %s form as %s goes from the door over the desk into the book',
  async (key, kind, layout, build, day) => {
    // The tractor's second road run: its meter has gone on.
    const run = build({ ...head(day), ...(kind === 'xlsx' ? { hour_meter_start: 1250.3, hour_meter_end: 1251.3 } : {}) })
    const bytes = kind === 'csv' ? csvOf(layout, run) : await workbookOf(layout, run)
    const sheet = await sheetFrom(`${key}.${kind}`, bytes)
    expect(sheet).toMatchObject({ layout: key, layoutVersion: 1 })
    const values = Object.fromEntries(sheet.readings.map((reading) => [reading.key, reading.value]))
    for (const row of formRows(layout)) expect([row.key, values[row.key]]).toEqual([row.key, run[row.key] ?? null])
    const record = await enter(sheet)
    expect(record.results.fuel_ml?.value).toBe(run.fuel_used_written_ml)
  },
  150_000,
)

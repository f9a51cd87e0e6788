/** What analysts take away: every format read back by a library that did not write it. */
import { readFile } from 'node:fs/promises'
import { Ajv } from 'ajv'
import addFormats from 'ajv-formats'
import Excel from 'exceljs'
import { parquetMetadata, parquetReadObjects, parquetSchema } from 'hyparquet'
import Papa from 'papaparse'
import { afterAll, beforeAll, expect, test } from 'vitest'
import yauzl from 'yauzl'
import { bookRecords } from '../../server/db/desk/book-lines.ts'
import { headerOf } from '../../shared/layouts/column.ts'
import { valueColumns } from '../../shared/layouts/value-columns.ts'
import { type BookValue, bookValueSchema } from '../../shared/schemas/book-value.ts'
import type { TrialRecord } from '../../shared/schemas/record.ts'
import { createRecord } from '../builders/record.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let analyst: TestAgent
let records: TrialRecord[]
const names = valueColumns().map((c) => c.name)

beforeAll(async () => {
  server = await startTestServer()
  await createGoldenRegisters(server.deps.source)
  const clerk = await server.signIn('clerk')
  analyst = await server.signIn('analyst')
  const { user } = await server.signIn('demonstrator')
  for (let n = 1; n <= 3; n += 1) await createRecord(server, clerk, user)
  await server.deps.source.query("UPDATE places SET name = '=HYPERLINK(1)' WHERE number = 21")
  const numbers = [1, 2, 3]
  records = await Promise.all(numbers.map(async (n) => (await analyst.get(`/records/${n}`)).body as TrialRecord))
})
afterAll(() => server.close())

interface Taken {
  values: BookValue[]
  next: number | null
}

async function allValues(records = 50): Promise<BookValue[]> {
  const values: BookValue[] = []
  let after = ''
  for (;;) {
    const taken = (await analyst.get(`/values?records=${records}${after}`)).body as Taken
    values.push(...taken.values)
    if (taken.next === null) return values
    after = `&after=${taken.next}`
  }
}

/** As a reader of CSV takes it without being told anything: numbers as numbers, nothing as missing. */
const parseCsv = (text: string) =>
  Papa.parse<Record<string, unknown>>(text, { header: true, dynamicTyping: true, skipEmptyLines: true }).data

test('the long data hold every reading and figure once, with unit, uncertainty, versions and origin', async () => {
  const values = await allValues()
  for (const value of values) bookValueSchema.parse(value)
  for (const record of records) {
    const own = values.filter((v) => v.record === record.number)
    expect(own.filter((v) => v.kind === 'figure').map((v) => v.key)).toEqual(Object.keys(record.results))
    for (const figure of own.filter((v) => v.kind === 'figure')) {
      const result = record.results[figure.key]!
      expect(figure).toMatchObject({ value: result.value, u: result.u, expanded_u: result.U, k: result.k, unit: result.unit })
      expect(figure.formula_version).toBe(record.formulaVersion)
      expect(figure.why).toBe(result.reason?.text ?? null)
    }
    const shown = record.readings.filter((r) => own.some((v) => v.kind === 'reading' && v.key === r.key))
    expect(own).toHaveLength(shown.length + Object.keys(record.results).length)
  }
})

test('signatures and names written on the sheet do not leave the book', async () => {
  const keys = new Set((await allValues()).map((v) => v.key))
  expect(records[0]?.readings.map((r) => r.key)).toContain('sign_farmer')
  expect([...keys].filter((key) => key.startsWith('sign_') || key === 'circuit_restored_by')).toEqual([])
})

test('a few records at a time give the same as all at once', async () => {
  expect(await allValues(1)).toEqual(await allValues())
})

test('every value leads to its ink in at most two calls', async () => {
  const { source, files } = server.deps
  await files.put('pages/ink.jpg', Buffer.from('ink'))
  await source.query("UPDATE pages SET picture_key = 'pages/ink.jpg'")
  const values = await allValues()
  const path = (ink: string) => new URL(ink).pathname.replace('/api', '') + new URL(ink).search
  const reading = values.find((v) => v.key === 'jar_start_ml')!
  expect(reading.ink).toMatch(/\/picture#xywh=percent:\d+(\.\d+)?(,\d+(\.\d+)?){3}$/)
  expect((await analyst.get(path(reading.ink))).bytes.toString()).toBe('ink')
  const figure = values.find((v) => v.key === 'l_per_ha' && v.value !== null)!
  const record = (await analyst.get(path(figure.ink))).body as TrialRecord
  const from = record.readings.filter((r) => figure.made_from?.split(' ').includes(r.key))
  expect(from.length).toBeGreaterThan(3)
  const page = from.find((r) => r.pageId)?.pageId
  expect((await analyst.get(`/pages/${page}/picture`)).bytes.toString()).toBe('ink')
})

test('CSV opens without being told anything: same lines, same numbers, nothing that runs', async () => {
  const text = (await analyst.get('/values.csv')).bytes.toString()
  const lines = parseCsv(text)
  const values = await allValues()
  expect(Object.keys(lines[0]!)).toEqual(names)
  expect(lines.map((l) => l.value)).toEqual(values.map((v) => v.value))
  expect(lines.map((l) => l.expanded_u)).toEqual(values.map((v) => v.expanded_u))
  expect(new Set(lines.map((l) => l.place))).toEqual(new Set(["'=HYPERLINK(1)"]))
  expect(text.endsWith('\r\n')).toBe(true)
})

test('XLSX holds the same, with dates as dates, and says what the columns mean', async () => {
  const workbook = new Excel.Workbook()
  await workbook.xlsx.load((await analyst.get('/values.xlsx')).bytes as never)
  const [sheet, dictionary] = workbook.worksheets
  const values = await allValues()
  expect(sheet?.rowCount).toBe(values.length + 1)
  const column = (name: string) => (sheet!.getColumn(names.indexOf(name) + 1).values as unknown[]).slice(2)
  expect(column('key')).toEqual(values.map((v) => v.key))
  values.forEach((v, i) => {
    expect(sheet?.getRow(i + 2).getCell(names.indexOf('value') + 1).value).toBe(v.value)
  })
  expect((column('trial_date')[0] as Date).toISOString().slice(0, 10)).toBe(values[0]?.trial_date)
  expect(column('place')[0]).toBe("'=HYPERLINK(1)")
  expect((dictionary!.getColumn(1).values as unknown[]).slice(2)).toEqual(names)
})

test('Parquet holds the same, with the types of its columns', async () => {
  const { bytes } = await analyst.get('/values.parquet')
  const file = bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length) as ArrayBuffer
  const types = Object.fromEntries(
    parquetSchema(parquetMetadata(file)).children.map(({ element: e }) => [e.name, e.converted_type ?? e.type]),
  )
  expect(types).toMatchObject({
    record: 'INT32',
    trial_date: 'DATE',
    value: 'DOUBLE',
    unit: 'UTF8',
    settled_at: 'TIMESTAMP_MILLIS',
  })
  const lines = await parquetReadObjects({ file })
  const values = await allValues()
  expect(lines.map((l) => l.value ?? null)).toEqual(values.map((v) => v.value))
  expect(lines.map((l) => l.ink)).toEqual(values.map((v) => v.ink))
  expect((lines[0]!.trial_date as Date).toISOString().slice(0, 10)).toBe(values[0]?.trial_date)
})

test('the wide data are one line a record in all three formats', async () => {
  const csv = parseCsv((await analyst.get('/records.csv')).bytes.toString())
  const { bytes } = await analyst.get('/records.parquet')
  const file = bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length) as ArrayBuffer
  const parquet = await parquetReadObjects({ file })
  const workbook = new Excel.Workbook()
  await workbook.xlsx.load((await analyst.get('/records.xlsx')).bytes as never)
  expect(csv.map((l) => l.record)).toEqual([3, 2, 1])
  expect(workbook.worksheets[0]?.rowCount).toBe(4)
  expect(parquet.map((l) => l.l_per_ha ?? null)).toEqual(csv.map((l) => l['l_per_ha [L/ha]']))
  // The short golden sheet, worked out by hand in the method.
  expect(csv.find((l) => l.record === 1)?.['l_per_ha [L/ha]']).toBeCloseTo(14.074074, 6)
  expect(parquetMetadata(file).key_value_metadata).toContainEqual({ key: 'unit.l_per_ha', value: 'L/ha' })
  expect(parquet[0]?.vent_open).toBe(true)
})

test('the Data Package fits its standard, and its fields are those of the files in it', async () => {
  const files = await unzip((await analyst.get('/datapackage.zip')).bytes)
  const descriptor = JSON.parse(files['datapackage.json']!) as {
    resources: { path: string; schema: { fields: { name: string; type: string; unit?: string }[] } }[]
  }
  const ajv = new Ajv({ allErrors: true, strict: false })
  ;(addFormats as unknown as (to: Ajv) => void)(ajv)
  const fits = ajv.compile(JSON.parse(await readFile('tests/fixtures/data-package-2.0.json', 'utf8')) as object)
  fits(descriptor)
  expect(fits.errors).toBeNull()
  for (const { path, schema } of descriptor.resources) {
    const lines = parseCsv(files[path]!)
    expect(Object.keys(lines[0]!)).toEqual(schema.fields.map((f) => f.name))
    for (const { name, type } of schema.fields) {
      const wanted = type === 'number' || type === 'integer' ? 'number' : type === 'boolean' ? 'boolean' : undefined
      if (!wanted) continue
      const kinds = new Set(
        lines
          .map((l) => l[name])
          .filter((v) => v !== null)
          .map((v) => typeof v),
      )
      expect(
        [...kinds].every((kind) => kind === wanted),
        `${path} ${name}`,
      ).toBe(true)
    }
  }
  expect(descriptor.resources[0]?.schema.fields.find((f) => f.name.startsWith('l_per_ha '))?.unit).toBe('L/ha')
  const alone = (await analyst.get('/datapackage.json')).body as { resources: unknown }
  expect(alone.resources).toEqual(descriptor.resources)
})

test('the dictionaries name every column of the files', async () => {
  for (const kind of ['records', 'values']) {
    const [heading] = (await analyst.get(`/${kind}.csv`)).bytes.toString().split('\r\n')
    const dictionary = parseCsv((await analyst.get(`/${kind}/dictionary.csv`)).bytes.toString())
    expect(dictionary.map((l) => l.column)).toEqual(heading?.split(','))
  }
  expect(valueColumns().map(headerOf)).toEqual(names)
})

test('a filter holds for the downloads as for the page', async () => {
  const none = parseCsv((await analyst.get('/values.csv?from=2027-01-01')).bytes.toString())
  expect(none).toEqual([])
  expect((await analyst.get('/values?from=2027-01-01')).body).toEqual({ values: [], next: null })
})

test('who stops reading gives the connection back, as often as they do', async () => {
  const { source } = server.deps
  for (let times = 0; times < 12; times += 1) {
    for await (const record of bookRecords(source, {})) {
      expect(record.number).toBe(3)
      break
    }
  }
  expect((await analyst.get('/values')).status).toBe(200)
})

function unzip(bytes: Buffer): Promise<Record<string, string>> {
  const files: Record<string, string> = {}
  return new Promise((resolve, reject) => {
    yauzl.fromBuffer(bytes, { lazyEntries: true }, (failed, zip) => {
      if (failed) return reject(failed)
      zip.on('error', reject)
      zip.on('end', () => resolve(files))
      zip.on('entry', (entry: yauzl.Entry) => {
        zip.openReadStream(entry, async (cause, stream) => {
          if (cause) return reject(cause)
          const pieces: Buffer[] = []
          for await (const piece of stream) pieces.push(piece as Buffer)
          files[entry.fileName] = Buffer.concat(pieces).toString()
          zip.readEntry()
        })
      })
      zip.readEntry()
    })
  })
}

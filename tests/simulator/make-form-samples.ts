/**
 * Writes samples/form-xlsx and samples/form-csv: the spreadsheet forms of the layout, filled in as offices fill them in, with
 * what was meant (NAME.truth.json) and what must come out (expected.json, to be looked through after any change).
 */
import { mkdir, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import exceljs from 'exceljs'
import { csvLine } from '../../server/print/csv-text.ts'
import { writeFormXlsx } from '../../server/print/form-xlsx.ts'
import { csvHeading, FORM_COLUMNS, FORM_HEAD, FORM_SHEET, type FormRow, formRows } from '../../shared/layouts/form.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { SpreadsheetReading } from '../../worker/readers/spreadsheet/block.ts'
import { readCsv } from '../../worker/readers/spreadsheet/csv.ts'
import { readXlsx } from '../../worker/readers/spreadsheet/xlsx.ts'
import { toExpectedForm } from './expected-form.ts'
import { chanceOf } from './random.ts'
import type { Written } from './scenario.ts'
import { MACHINES, tillageScenario } from './scenario-tillage.ts'

type Readings = Record<string, Written>

const rows = formRows(tillage1)
const head = { trial_date: '2026-11-25', place_id: 2, demonstrator_id: 102, tractor_id: 11, implement_id: 21, kit_id: 31 }
const machine = MACHINES.find((m) => m.implement_id === head.implement_id)!
const runOf = (name: string): Readings => tillageScenario(chanceOf(`form|${name}`), { head, machine }).readings
const DAY_MS = 86_400_000

/** A value as a spreadsheet program keeps it: dates and times as serials, ticks as words. */
function typed(row: FormRow, value: Written | undefined): exceljs.CellValue {
  if (value === undefined || value === null) return null
  if (value === true || value === false) return value ? 'yes' : 'no'
  if (row.kind === 'date') return new Date(`${value}T00:00:00Z`)
  if (row.kind !== 'time') return value
  const [hours = 0, minutes = 0] = String(value).split(':').map(Number)
  return new Date(Date.UTC(1899, 11, 30) + ((hours * 60 + minutes) / 1440) * DAY_MS)
}

/** What an office does to a value, and what must become of it: a doubt, or the value that was meant. */
const HABITS: Record<string, (written: Written) => exceljs.CellValue> = {
  'depth_cm[1]': (written) => String(written).replace('.', ','),
  'depth_cm[2]': (written) => `${Number(written) * 10} mm`,
  'depth_cm[3]': (written) => `${written} cm`,
  fuel_used_written_ml: (written) => ({ formula: 'SUM(1,1)', result: Number(written), date1904: false }),
  t_start: (written) => String(written).replace(/^0/, ''),
  'width_m[1]': () => 'see yesterday',
}
const DOUBTED = ['depth_cm[1]', 'depth_cm[2]', 'width_m[1]']

const truthOf = (readings: Readings, spoiled: string[] = []) => ({
  layout: tillage1.key,
  version: tillage1.version,
  sheet: null,
  level: 'form',
  readings: Object.fromEntries(rows.map((row) => [row.key, readings[row.key] ?? null])),
  spoiled,
  wrongSum: [],
})

async function write(
  name: string,
  file: string,
  bytes: Uint8Array,
  reading: SpreadsheetReading,
  truths: unknown[],
): Promise<void> {
  const folder = join('samples', name)
  await mkdir(folder, { recursive: true })
  await writeFile(join(folder, file), bytes)
  await writeFile(join(folder, `${name}.truth.json`), `${JSON.stringify(truths, null, 1)}\n`)
  await writeFile(join(folder, 'expected.json'), `${JSON.stringify(toExpectedForm(reading), null, 1)}\n`)
  process.stdout.write(`${folder}: ${truths.length} runs\n`)
}

async function writeWorkbook(): Promise<void> {
  const [clean, habits] = [runOf('clean'), runOf('habits')]
  const workbook = new exceljs.Workbook()
  await workbook.xlsx.load((await writeFormXlsx(tillage1)).buffer as ArrayBuffer)
  workbook.created = new Date(0)
  workbook.modified = new Date(0)
  const sheet = workbook.getWorksheet(FORM_SHEET)!
  sheet.eachRow((line) => {
    const row = rows.find((r) => r.key === line.getCell(FORM_COLUMNS.key).value)
    if (!row) return
    line.getCell(FORM_COLUMNS.firstValue).value = typed(row, clean[row.key])
    const written = habits[row.key]
    const habit = HABITS[row.key]
    line.getCell(FORM_COLUMNS.firstValue + 1).value =
      habit && written !== null && written !== undefined ? habit(written) : typed(row, written)
  })
  const bytes = new Uint8Array((await workbook.xlsx.writeBuffer()) as ArrayBuffer)
  await write('form-xlsx', 'form-xlsx.xlsx', bytes, await readXlsx(bytes), [truthOf(clean), truthOf(habits, DOUBTED)])
}

/** As a spreadsheet program with a decimal comma saves it: semicolons, commas in the numbers, and the form says so. */
async function writeText(): Promise<void> {
  const runs = [runOf('csv one'), runOf('csv two')]
  const field = (row: FormRow, value: Written | undefined) => {
    if (value === undefined || value === null) return ''
    if (value === true || value === false) return value ? 'yes' : 'no'
    return row.kind === 'number' ? String(value).replace('.', ',') : String(value)
  }
  const heading = [FORM_HEAD.layout, FORM_HEAD.version, FORM_HEAD.decimalMark, FORM_HEAD.sheetCode, ...rows.map(csvHeading)]
  const lines = runs.map((run) => [tillage1.key, tillage1.version, ',', '', ...rows.map((row) => field(row, run[row.key]))])
  const text = [csvLine(heading).replaceAll(',', ';'), ...lines.map((line) => `${line.join(';')}\r\n`)].join('')
  const bytes = new TextEncoder().encode(text)
  await write(
    'form-csv',
    'form-csv.csv',
    bytes,
    readCsv(bytes),
    runs.map((run) => truthOf(run)),
  )
}

await writeWorkbook()
await writeText()

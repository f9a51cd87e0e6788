/** The workbook form of a layout: one run a column, typed cells, choices to pick, a note at each key. */
import type { Cell, Worksheet } from 'exceljs'
import {
  DECIMAL_MARKS,
  FORM_COLUMNS,
  FORM_HEAD,
  FORM_RUNS,
  FORM_SHEET,
  type FormRow,
  formRows,
} from '../../shared/layouts/form.ts'
import type { Layout } from '../../shared/layouts/layout.ts'

const INK = 'FF15202B'
const HEAD_FILL = 'FFEFE6D2'
const KEY_GREY = 'FF4A5661'

/** @returns the bytes of an .xlsx file with empty cells for 20 runs */
export async function writeFormXlsx(layout: Layout): Promise<Buffer> {
  const { default: exceljs } = await import('exceljs')
  const workbook = new exceljs.Workbook()
  workbook.title = layout.title
  workbook.creator = 'Sheafbook'
  const sheet = workbook.addWorksheet(FORM_SHEET, {
    views: [{ state: 'frozen', xSplit: FORM_COLUMNS.key, ySplit: 5 }],
    pageSetup: { orientation: 'landscape', paperSize: 9, fitToPage: true, fitToHeight: 0 },
  })
  sheet.columns = [{ width: 34 }, { width: 8 }, { width: 25 }, ...Array.from({ length: FORM_RUNS }, () => ({ width: 13 }))]
  writeHead(sheet, layout)
  let section = -1
  for (const row of formRows(layout)) {
    if (row.section !== section) {
      section = row.section
      addSection(sheet, layout, section)
    }
    addRow(sheet, row)
  }
  return Buffer.from(await workbook.xlsx.writeBuffer())
}

function writeHead(sheet: Worksheet, layout: Layout): void {
  const first = FORM_COLUMNS.firstValue
  sheet.addRow([layout.title, '', FORM_HEAD.layout, layout.key])
  sheet.addRow(['version of the sheet', '', FORM_HEAD.version, layout.version])
  sheet.addRow(['decimal mark of numbers typed as text', '', FORM_HEAD.decimalMark, '.'])
  listIn(sheet.getCell(3, first), DECIMAL_MARKS)
  sheet.addRow(['run', '', '', ...Array.from({ length: FORM_RUNS }, (_, i) => i + 1)])
  sheet.addRow(['sheet code, if a sheet was printed', '', FORM_HEAD.sheetCode])
  for (let run = 0; run < FORM_RUNS; run += 1) sheet.getCell(5, first + run).numFmt = '@'
  for (let number = 1; number <= 5; number += 1) {
    sheet.getRow(number).font = { bold: true, color: { argb: INK } }
    sheet.getRow(number).fill = { type: 'pattern', pattern: 'solid', fgColor: { argb: HEAD_FILL } }
  }
}

function addSection(sheet: Worksheet, layout: Layout, number: number): void {
  const section = layout.sections.find((s) => s.number === number)
  const row = sheet.addRow([section ? `${section.number}  ${section.title}` : 'Head'])
  row.font = { bold: true, color: { argb: INK } }
  row.border = { top: { style: 'thin', color: { argb: INK } } }
}

function addRow(sheet: Worksheet, row: FormRow): void {
  const added = sheet.addRow([row.label, row.unit ?? '', row.key])
  added.getCell(FORM_COLUMNS.key).font = { color: { argb: KEY_GREY } }
  added.getCell(FORM_COLUMNS.key).note = noteOf(row)
  for (let run = 0; run < FORM_RUNS; run += 1) prepare(added.getCell(FORM_COLUMNS.firstValue + run), row)
}

function prepare(cell: Cell, row: FormRow): void {
  if (row.kind === 'number')
    cell.numFmt = row.places === 0 ? '0' : `0.${'0'.repeat(row.unitBy ? 0 : row.places)}${row.unitBy ? '##' : ''}`
  else if (row.kind === 'date') cell.numFmt = 'yyyy-mm-dd'
  else if (row.kind === 'time') cell.numFmt = 'hh:mm'
  else if (row.kind === 'text') cell.numFmt = '@'
  else
    listIn(
      cell,
      row.options.map((o) => o.option),
    )
  if (row.kind === 'number' && row.hard) {
    // A warning, not a refusal: what was really read may be typed, and is doubted with its reason.
    cell.dataValidation = {
      type: 'decimal',
      operator: 'between',
      formulae: [...row.hard],
      allowBlank: true,
      showErrorMessage: true,
      errorStyle: 'warning',
      errorTitle: row.label,
      error: `Outside ${row.hard[0]} to ${row.hard[1]}${row.unit ? ` ${row.unit}` : ''}.`,
    }
  }
}

function listIn(cell: Cell, options: readonly string[]): void {
  // A comma as an option would part the list: quoted one by one it cannot be written, so it is left to typing.
  const listed = options.filter((option) => !option.includes(','))
  if (listed.length < options.length) return
  cell.dataValidation = { type: 'list', allowBlank: true, formulae: [`"${listed.join(',')}"`] }
}

function noteOf(row: FormRow): string {
  const parts = [
    { mandatory: 'needed', conditional: 'needed where its method is used', optional: 'may stay empty' }[row.need],
    row.planned ? 'may stay empty beside a sheet code: the plan knows it' : '',
    row.format && row.kind === 'number' ? `as ${row.format} on the sheet` : '',
    row.kind === 'date' ? 'a date: year-month-day, or day-month-year' : '',
    row.kind === 'time' ? 'a clock time: hours:minutes' : '',
    row.unitBy ? `in the unit of ${row.unitBy}` : '',
    row.instrument ?? '',
    row.options.some((o) => o.option !== o.label) ? row.options.map((o) => `${o.option}: ${o.label}`).join(', ') : '',
  ]
  return parts.filter(Boolean).join('; ')
}

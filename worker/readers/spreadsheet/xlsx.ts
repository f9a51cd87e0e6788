/** Reads the workbook form: labels, units and keys in columns A to C, one run a column from D on. */
import type { CellValue, Cell as WorkbookCell, Worksheet } from 'exceljs'
import { type DecimalMark, FORM_COLUMNS, FORM_HEAD, FORM_RUNS } from '../../../shared/layouts/form.ts'
import type { Block, SpreadsheetReading } from './block.ts'
import { type Cell, rawOf, serialOf } from './cell.ts'
import { isEmptyRun, layoutOf, type RawRun, toBlock } from './form-block.ts'

/** Rows past this one hold no form of ours. */
const MOST_ROWS = 1_000

/** @throws when the file is no workbook that can be opened */
export async function readXlsx(bytes: Uint8Array): Promise<SpreadsheetReading> {
  const { default: exceljs } = await import('exceljs')
  const workbook = new exceljs.Workbook()
  await workbook.xlsx.load(bytes.slice().buffer)
  const blocks: Block[] = []
  let forms = 0
  for (const sheet of workbook.worksheets) {
    const rows = findRows(sheet)
    if (!rows.has(FORM_HEAD.layout) || !rows.has(FORM_HEAD.version)) continue
    forms += 1
    const layout = layoutOf(headText(sheet, rows, FORM_HEAD.layout), Number(headText(sheet, rows, FORM_HEAD.version)))
    if ('reason' in layout) return { kind: 'not a form', reason: layout.reason }
    for (const run of listRuns(sheet, rows)) blocks.push(toBlock({ ...run, number: blocks.length + 1 }, layout))
  }
  if (forms === 0) {
    return notAForm(
      `None of its sheets has "${FORM_HEAD.layout}" and "${FORM_HEAD.version}" in column C. Take a fresh form from the layout's page.`,
    )
  }
  return blocks.length > 0 ? { kind: 'blocks', blocks } : BLANK
}

/** Where each key stands: rows may have been moved or inserted, the keys of column C tell them. */
function findRows(sheet: Worksheet): Map<string, number> {
  const rows = new Map<string, number>()
  for (let number = 1; number <= Math.min(sheet.rowCount, MOST_ROWS); number += 1) {
    const key = textAt(sheet, number, FORM_COLUMNS.key)
    if (key !== '' && !rows.has(key)) rows.set(key, number)
  }
  return rows
}

function* listRuns(sheet: Worksheet, rows: Map<string, number>): Generator<RawRun> {
  const mark: DecimalMark = headText(sheet, rows, FORM_HEAD.decimalMark) === ',' ? ',' : '.'
  const layout = headText(sheet, rows, FORM_HEAD.layout)
  const version = Number(headText(sheet, rows, FORM_HEAD.version))
  const codeRow = rows.get(FORM_HEAD.sheetCode)
  for (let column = FORM_COLUMNS.firstValue; column < FORM_COLUMNS.firstValue + FORM_RUNS; column += 1) {
    const cells = new Map<string, { cell: Cell; cellRef: string; unit: string | null }>()
    for (const [key, number] of rows) {
      if (Object.values(FORM_HEAD).some((head) => head === key)) continue
      const cell = sheet.getRow(number).getCell(column)
      const unit = textAt(sheet, number, FORM_COLUMNS.unit)
      cells.set(key, { cell: toCell(cell), cellRef: `${sheet.name}!${cell.address}`, unit: unit === '' ? null : unit })
    }
    const sheetCode: Cell = codeRow === undefined ? { kind: 'empty' } : toCell(sheet.getRow(codeRow).getCell(column))
    const place = `column ${sheet.getColumn(column).letter} of ${sheet.name}`
    const run: RawRun = { number: 0, place, layout, version, mark, sheetCode, cells }
    if (!isEmptyRun(run)) yield run
  }
}

const textAt = (sheet: Worksheet, row: number, column: number) => rawOf(toCell(sheet.getRow(row).getCell(column)))?.trim() ?? ''

const headText = (sheet: Worksheet, rows: Map<string, number>, key: string) =>
  textAt(sheet, rows.get(key) ?? 0, FORM_COLUMNS.firstValue)

function toCell(cell: WorkbookCell): Cell {
  if (cell.isMerged && cell.master.address !== cell.address) {
    const text = rawOf(fromValue(cell.master.value)) ?? ''
    return text === ''
      ? { kind: 'empty' }
      : { kind: 'broken', text, why: `it is merged with ${cell.master.address}, so it is not sure which run is meant.` }
  }
  return fromValue(cell.value)
}

function fromValue(value: CellValue): Cell {
  if (value === null || value === undefined || value === '') return { kind: 'empty' }
  if (typeof value === 'number') return { kind: 'number', number: value }
  if (typeof value === 'string') return { kind: 'text', text: value }
  if (typeof value === 'boolean') return { kind: 'boolean', boolean: value }
  if (value instanceof Date) return { kind: 'serial', serial_d: serialOf(value) }
  if ('richText' in value) return { kind: 'text', text: value.richText.map((part) => part.text).join('') }
  if ('error' in value) return { kind: 'broken', text: value.error, why: 'the spreadsheet itself could not calculate it.' }
  if ('hyperlink' in value) return { kind: 'text', text: String(value.text) }
  if (value.result === undefined) {
    const formula = 'formula' in value ? value.formula : value.sharedFormula
    return {
      kind: 'broken',
      text: `=${formula}`,
      why: 'a formula that was saved without its value. Open and save it in a spreadsheet program.',
    }
  }
  return fromValue(value.result as CellValue)
}

const BLANK: SpreadsheetReading = {
  kind: 'not a form',
  reason:
    'This is our form, but no run is filled in. Nothing was kept. Fill in a column from D on, one run a column, and send it again.',
}

const notAForm = (reason: string): SpreadsheetReading => ({
  kind: 'not a form',
  reason: `This workbook is not a form of ours. ${reason}`,
})

/** Reads the CSV form: a heading of keys with units, one run a row (RFC 4180; semicolons and tabs are taken as well). */
import Papa from 'papaparse'
import { type DecimalMark, FORM_HEAD, parseCsvHeading } from '../../../shared/layouts/form.ts'
import type { SpreadsheetReading } from './block.ts'
import type { Cell } from './cell.ts'
import { isEmptyRun, layoutOf, type RawRun, toBlock } from './form-block.ts'

/** More rows than a season has runs: whatever it is, it is not our form. */
const MOST_RUNS = 5_000

/** @param bytes UTF-8 (with or without a byte order mark), or UTF-16 with one */
export function readCsv(bytes: Uint8Array): SpreadsheetReading {
  const text = decode(bytes)
  if (text === null)
    return notAForm('Its characters are in no encoding this reader knows. Save it as CSV in UTF-8 and send it again.')
  const rows = parse(text)
  const headings = (rows[0] ?? []).map(parseCsvHeading)
  const keys = headings.map((heading) => heading?.key)
  if (!keys.includes(FORM_HEAD.layout) || !keys.includes(FORM_HEAD.version)) {
    return notAForm(
      `Its first row must name the columns "${FORM_HEAD.layout}" and "${FORM_HEAD.version}". Take a fresh form from the layout's page.`,
    )
  }
  const twice = keys.find((key, i) => key !== undefined && keys.indexOf(key) !== i)
  if (twice !== undefined) return notAForm(`Two of its columns are headed "${twice}". Remove one of them and send it again.`)
  if (rows.length - 1 > MOST_RUNS) return notAForm(`It has ${rows.length - 1} rows; a form has at most ${MOST_RUNS}.`)
  return collect(rows.slice(1), headings)
}

function collect(rows: string[][], headings: Array<ReturnType<typeof parseCsvHeading>>): SpreadsheetReading {
  const blocks = []
  for (const [i, row] of rows.entries()) {
    const run = toRun(row, headings, i + 2)
    if (isEmptyRun(run)) continue
    const layout = layoutOf(run.layout, run.version)
    if ('reason' in layout) return { kind: 'not a form', reason: `${run.place}: ${layout.reason}` }
    const extra = row.slice(headings.length).filter((cell) => cell.trim() !== '')
    const block = toBlock({ ...run, number: blocks.length + 1 }, layout)
    if (extra.length > 0)
      block.problems.push(`${run.place} has ${extra.length} values more than the heading has columns: "${extra.join('", "')}".`)
    blocks.push(block)
  }
  return blocks.length > 0 ? { kind: 'blocks', blocks } : BLANK
}

function toRun(row: string[], headings: Array<ReturnType<typeof parseCsvHeading>>, line: number): RawRun {
  const at = (key: string) => row[headings.findIndex((heading) => heading?.key === key)]?.trim() ?? ''
  const cells = new Map<string, { cell: Cell; cellRef: string; unit: string | null }>()
  for (const [i, heading] of headings.entries()) {
    if (!heading || Object.values(FORM_HEAD).some((head) => head === heading.key)) continue
    cells.set(heading.key, { cell: toCell(row[i]), cellRef: `row ${line}, column ${i + 1}`, unit: heading.unit })
  }
  return {
    number: 0,
    place: `row ${line}`,
    layout: at(FORM_HEAD.layout),
    version: Number(at(FORM_HEAD.version)),
    mark: (at(FORM_HEAD.decimalMark) === ',' ? ',' : '.') satisfies DecimalMark,
    sheetCode: toCell(at(FORM_HEAD.sheetCode)),
    cells,
  }
}

const toCell = (text: string | undefined): Cell =>
  text === undefined || text.trim() === '' ? { kind: 'empty' } : { kind: 'text', text }

/** The first line decides between comma, semicolon and tab, since headings hold none of them. */
function parse(text: string): string[][] {
  const head = text.slice(0, text.search(/[\r\n]|$/))
  const delimiter = [',', ';', '\t'].reduce(
    (best, mark) => (head.split(mark).length > head.split(best).length ? mark : best),
    ',',
  )
  return Papa.parse<string[]>(text, { delimiter, skipEmptyLines: true }).data
}

function decode(bytes: Uint8Array): string | null {
  const utf16 = bytes[0] === 0xff && bytes[1] === 0xfe ? 'utf-16le' : bytes[0] === 0xfe && bytes[1] === 0xff ? 'utf-16be' : null
  try {
    return new TextDecoder(utf16 ?? 'utf-8', { fatal: true }).decode(bytes)
  } catch {
    return null
  }
}

const BLANK: SpreadsheetReading = {
  kind: 'not a form',
  reason:
    'This is our form, but no run is filled in. Nothing was kept. Fill in a row below the heading, one run a row, and send it again.',
}

const notAForm = (reason: string): SpreadsheetReading => ({
  kind: 'not a form',
  reason: `This CSV file is not a form of ours. ${reason}`,
})

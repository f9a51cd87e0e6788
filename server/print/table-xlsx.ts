/**
 * A workbook (ECMA-376, part 1) written as it comes: text stands in the cells themselves, so no list of strings grows. Our own,
 * since the library that writes our forms takes four times as long for a long sheet and gives nothing more here.
 */
import { type Column, headerOf } from '../../shared/layouts/column.ts'
import type { Value } from '../../shared/schemas/sheet.ts'
import { safeText } from './csv-text.ts'
import { type Line, type Pieces, piecesOf, type Table } from './table.ts'
import { type ZipEntry, zipOf } from './zip.ts'

/** Rows a worksheet holds (Excel specifications and limits), the heading among them; what is more goes to a further sheet. */
const SHEET_ROWS = 1_048_576
const XML = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n'
const MAIN = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main'
const RELATED = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships'
const PACKAGE = 'http://schemas.openxmlformats.org/package/2006'

/** Cell formats of `STYLES`, by position. */
const BOLD = 1
const DATE = 2
const MOMENT = 3
const STYLES = `${XML}<styleSheet xmlns="${MAIN}"><numFmts count="2"><numFmt numFmtId="164" formatCode="yyyy\\-mm\\-dd"/><numFmt numFmtId="165" formatCode="yyyy\\-mm\\-dd\\ hh:mm"/></numFmts><fonts count="2"><font/><font><b/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border/></borders><cellStyleXfs count="1"><xf/></cellStyleXfs><cellXfs count="4"><xf/><xf fontId="1" applyFont="1"/><xf numFmtId="164" applyNumberFormat="1"/><xf numFmtId="165" applyNumberFormat="1"/></cellXfs></styleSheet>`

/** Control characters, halves of characters and two that are none: XML 1.0 cannot hold most of them. */
const UNWRITABLE = /[^\P{Cc}\t\n\r]|[\p{Cs}\ufffe\uffff]/gu
const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' }
const escaped = (text: string) => text.replace(UNWRITABLE, '\ufffd').replace(/[&<>"]/g, (mark) => ESCAPES[mark] ?? mark)

/** 1 -> A, 27 -> AA */
function letters(column: number): string {
  const rest = (column - 1) % 26
  return (column > 26 ? letters((column - 1 - rest) / 26) : '') + String.fromCharCode(65 + rest)
}

const DAY_MS = 86_400_000
/** Days since the last day of 1899, as spreadsheets count from March 1900 on. */
const serial = (iso: string) => Date.parse(iso) / DAY_MS + 25_569

const textCell = (ref: string, text: string, style = 0) =>
  `<c r="${ref}" t="inlineStr"${style ? ` s="${style}"` : ''}><is><t xml:space="preserve">${escaped(text)}</t></is></c>`

function cell(ref: string, kind: Column['kind'], value: Value): string {
  if (value === null) return ''
  if (typeof value === 'number') return `<c r="${ref}"><v>${value}</v></c>`
  if (typeof value === 'boolean') return `<c r="${ref}" t="b"><v>${value ? 1 : 0}</v></c>`
  if (kind === 'date' || kind === 'moment')
    return `<c r="${ref}" s="${kind === 'date' ? DATE : MOMENT}"><v>${serial(value)}</v></c>`
  return textCell(ref, safeText(value))
}

/** Lines that are looked at before they are taken. */
interface Ahead {
  some: readonly Line[] | null
  take(): Promise<void>
}

async function lookAhead(lines: AsyncIterator<readonly Line[]>): Promise<Ahead> {
  const ahead: Ahead = {
    some: null,
    take: async () => {
      const next = await lines.next()
      ahead.some = next.done ? null : next.value
    },
  }
  await ahead.take()
  return ahead
}

/** A worksheet of as many lines as fit; the rest is left for the next one. */
async function* sheetText(columns: readonly Column[], ahead: Ahead, rows: number): AsyncGenerator<string> {
  const names = columns.map((_, i) => letters(i + 1))
  const rowText = (line: Line, row: number) =>
    `<row r="${row}">${columns.map((c, i) => cell(`${names[i]}${row}`, c.kind, line[i] ?? null)).join('')}</row>`
  yield `${XML}<worksheet xmlns="${MAIN}"><sheetViews><sheetView workbookViewId="0"><pane ySplit="1" topLeftCell="A2" activePane="bottomLeft" state="frozen"/></sheetView></sheetViews><cols>`
  yield columns.map((c, i) => `<col min="${i + 1}" max="${i + 1}" width="${Math.max(10, headerOf(c).length + 1)}"/>`).join('')
  yield `</cols><sheetData><row r="1">${columns.map((c, i) => textCell(`${names[i]}1`, headerOf(c), BOLD)).join('')}</row>`
  for (let row = 2; ahead.some && row - 1 + ahead.some.length <= rows; ) {
    const first = row
    yield ahead.some.map((line, i) => rowText(line, first + i)).join('')
    row += ahead.some.length
    await ahead.take()
  }
  yield '</sheetData></worksheet>'
}

async function* whole(text: string): AsyncGenerator<Buffer> {
  yield Buffer.from(text)
}

async function* partsOf(tables: readonly Table[], sheetRows: number): AsyncGenerator<ZipEntry> {
  const names: string[] = []
  for (const { name, columns, lines } of tables) {
    const iterator = lines[Symbol.asyncIterator]()
    try {
      const ahead = await lookAhead(iterator)
      for (let part = 1; part === 1 || ahead.some; part += 1) {
        names.push(part === 1 ? name : `${name} ${part}`)
        yield { name: `xl/worksheets/sheet${names.length}.xml`, content: piecesOf(sheetText(columns, ahead, sheetRows)) }
      }
    } finally {
      await iterator.return?.()
    }
  }
  yield { name: 'xl/styles.xml', content: whole(STYLES) }
  for (const [name, text] of Object.entries(frame(names))) yield { name, content: whole(text) }
}

/** What holds the sheets together; written last, when their number is known. */
function frame(names: readonly string[]): Record<string, string> {
  const kind = (part: string) => `application/vnd.openxmlformats-officedocument.spreadsheetml.${part}+xml`
  const override = (path: string, part: string) => `<Override PartName="/xl/${path}" ContentType="${kind(part)}"/>`
  const relation = (id: string, type: string, target: string) =>
    `<Relationship Id="${id}" Type="${RELATED}/${type}" Target="${target}"/>`
  const sheets = names.map((name, i) => ({ name: escaped(name), id: i + 1, path: `worksheets/sheet${i + 1}.xml` }))
  return {
    'xl/workbook.xml': `${XML}<workbook xmlns="${MAIN}" xmlns:r="${RELATED}"><sheets>${sheets.map((s) => `<sheet name="${s.name}" sheetId="${s.id}" r:id="rId${s.id}"/>`).join('')}</sheets></workbook>`,
    'xl/_rels/workbook.xml.rels': `${XML}<Relationships xmlns="${PACKAGE}/relationships">${sheets.map((s) => relation(`rId${s.id}`, 'worksheet', s.path)).join('')}${relation('styles', 'styles', 'styles.xml')}</Relationships>`,
    '_rels/.rels': `${XML}<Relationships xmlns="${PACKAGE}/relationships">${relation('book', 'officeDocument', 'xl/workbook.xml')}</Relationships>`,
    '[Content_Types].xml': `${XML}<Types xmlns="${PACKAGE}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/>${override('workbook.xml', 'sheet.main')}${override('styles.xml', 'styles')}${sheets.map((s) => override(s.path, 'worksheet')).join('')}</Types>`,
  }
}

/** One worksheet a table, and further ones where it has more than `sheetRows`. */
export const xlsxOf = (tables: readonly Table[], sheetRows = SHEET_ROWS): Pieces => zipOf(partsOf(tables, sheetRows))

/** A record as long data: one line a reading and one a figure, each with where it comes from. */
import { cellBounds } from '../../../shared/layouts/geometry.ts'
import type { Layout, LayoutCell } from '../../../shared/layouts/layout.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { BookValue } from '../../../shared/schemas/book-value.ts'
import type { ResultValue } from '../../../shared/schemas/record.ts'
import type { Reading } from '../../../shared/schemas/sheet.ts'
import type { BookRecord } from '../../db/desk/book-lines.ts'

type Shared = Pick<
  BookValue,
  | 'record'
  | 'version'
  | 'state'
  | 'sheet'
  | 'layout'
  | 'trial_date'
  | 'place'
  | 'tractor'
  | 'implement'
  | 'formula_version'
  | 'rules_version'
>

/** Cells by key, once a layout: they are looked up for every reading of every record. */
const cellsByLayout = new Map<Layout, Map<string, LayoutCell>>()

function cellsOf({ layoutKey, layoutVersion }: BookRecord): { layout: Layout | null; cells: Map<string, LayoutCell> } {
  const layout = findLayout(layoutKey, layoutVersion)
  if (!layout) return { layout, cells: new Map() }
  const known = cellsByLayout.get(layout) ?? new Map(layout.cells.map((cell) => [cell.key, cell]))
  cellsByLayout.set(layout, known)
  return { layout, cells: known }
}

export const layoutName = ({ layoutKey, layoutVersion }: BookRecord) => `${layoutKey} ${layoutVersion}`

/** What shows who a person is stays in the book. `at` is the address that links begin with. */
export function valuesOf(record: BookRecord, at: string): BookValue[] {
  const { layout, cells } = cellsOf(record)
  const shared: Shared = {
    record: record.number,
    version: record.version,
    state: record.state,
    sheet: record.sheetCode,
    layout: layoutName(record),
    trial_date: record.trialDate,
    place: record.place,
    tractor: record.tractor,
    implement: record.implement,
    formula_version: record.formulaVersion,
    rules_version: record.rulesVersion,
  }
  const self = `${at}/api/records/${record.number}?version=${record.version}`
  const shown = record.readings.filter(({ key }) => !isPersonal(cells.get(key)))
  return [
    ...shown.map((reading) => {
      const cell = cells.get(reading.key)
      return readingLine(shared, reading, cell?.label ?? reading.key, inkOf(reading, layout, cell, at) ?? self)
    }),
    ...Object.values(record.results).map((figure) => figureLine(shared, figure, self)),
  ]
}

const isPersonal = (cell: LayoutCell | undefined) => cell !== undefined && 'personal' in cell && cell.personal === true

function readingLine(shared: Shared, reading: Reading, label: string, ink: string): BookValue {
  const { value } = reading
  return {
    ...shared,
    kind: 'reading',
    key: reading.key,
    label,
    value: typeof value === 'number' ? value : null,
    text: value === null || typeof value === 'number' ? null : String(value),
    unit: reading.unit,
    u: null,
    expanded_u: null,
    k: null,
    formula: null,
    made_from: null,
    origin: reading.origin,
    cell: reading.cellRef,
    settlement: reading.settlement,
    settled_by: reading.settledBy,
    settled_at: reading.settledAt,
    why: reading.why === '' ? null : reading.why,
    ink,
  }
}

const figureLine = (shared: Shared, figure: ResultValue, ink: string): BookValue => ({
  ...shared,
  kind: 'figure',
  key: figure.key,
  label: figure.label,
  value: figure.value,
  text: null,
  unit: figure.unit,
  u: figure.u,
  expanded_u: figure.U,
  k: figure.k,
  formula: figure.formula,
  made_from: figure.from.join(' '),
  origin: 'formula',
  cell: null,
  settlement: null,
  settled_by: null,
  settled_at: null,
  why: figure.reason?.text ?? null,
  ink,
})

const percent = (part: number, whole: number) => Math.round((part / whole) * 10_000) / 100

/**
 * The flattened page with the part the cell takes up, as a media fragment (W3C Media Fragments 1.0, 4.2.2); the file itself
 * where it came as a spreadsheet. null where no page shows it.
 */
function inkOf({ pageId, origin }: Reading, layout: Layout | null, cell: LayoutCell | undefined, at: string): string | null {
  if (!pageId) return null
  if (origin === 'spreadsheet') return `${at}/api/pages/${pageId}/original`
  const picture = `${at}/api/pages/${pageId}/picture`
  if (!layout || !cell) return picture
  const { x, y, width, height } = cellBounds(cell)
  const across = layout.page.width
  const down = layout.page.height
  return `${picture}#xywh=percent:${percent(x, across)},${percent(y, down)},${percent(width, across)},${percent(height, down)}`
}

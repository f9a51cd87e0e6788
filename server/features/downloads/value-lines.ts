/** A record as long data: one line a reading and one a figure, each with where it comes from. */
import { cellBounds } from '../../../shared/layouts/geometry.ts'
import type { Layout, LayoutCell } from '../../../shared/layouts/layout.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { BookValue } from '../../../shared/schemas/book-value.ts'
import type { ResultValue } from '../../../shared/schemas/record.ts'
import type { Reading } from '../../../shared/schemas/sheet.ts'
import type { BookRecord } from '../../db/desk/book-lines.ts'

/** What all values of a record share. */
type Shared = Omit<BookValue, keyof Own>
type Own = Pick<
  BookValue,
  | 'kind'
  | 'key'
  | 'label'
  | 'value'
  | 'text'
  | 'unit'
  | 'u'
  | 'expanded_u'
  | 'k'
  | 'formula'
  | 'made_from'
  | 'origin'
  | 'cell'
  | 'settlement'
  | 'settled_by'
  | 'settled_at'
  | 'why'
  | 'ink'
>

/** What the layout knows of a cell. */
interface CellFacts {
  label: string
  /** Where it is on the flattened page, as a media fragment (W3C Media Fragments 1.0, 4.2.2). */
  fragment: string
  /** It shows who a person is. */
  personal: boolean
}

/** Kept once a layout version: they are asked for at every reading of every record. */
const factsByLayout = new Map<string, Map<string, CellFacts>>()

function factsOf({ layoutKey, layoutVersion }: BookRecord): Map<string, CellFacts> {
  const name = `${layoutKey} ${layoutVersion}`
  const known = factsByLayout.get(name)
  if (known) return known
  const layout = findLayout(layoutKey, layoutVersion)
  const made = new Map(layout?.cells.map((cell) => [cell.key, cellFacts(layout, cell)]))
  factsByLayout.set(name, made)
  return made
}

const percent = (part: number, whole: number) => Math.round((part / whole) * 10_000) / 100

function cellFacts({ page }: Layout, cell: LayoutCell): CellFacts {
  const { x, y, width, height } = cellBounds(cell)
  const across = [x, width].map((mm) => percent(mm, page.width))
  const down = [y, height].map((mm) => percent(mm, page.height))
  return {
    label: cell.label,
    fragment: `#xywh=percent:${across[0]},${down[0]},${across[1]},${down[1]}`,
    personal: 'personal' in cell && cell.personal === true,
  }
}

export const layoutName = ({ layoutKey, layoutVersion }: BookRecord) => `${layoutKey} ${layoutVersion}`

/** What shows who a person is stays in the book. `at` is the address that links begin with. */
export function valuesOf(record: BookRecord, at: string): BookValue[] {
  const facts = factsOf(record)
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
  const readings = record.readings.filter(({ key }) => !facts.get(key)?.personal)
  const own = readings.map((reading) => {
    const cell = facts.get(reading.key)
    return readingLine(reading, cell?.label ?? reading.key, inkOf(reading, cell, at) ?? self)
  })
  const figures = Object.values(record.results).map((figure) => figureLine(figure, self))
  return [...own, ...figures].map((one) => together(shared, one))
}

const readingLine = (reading: Reading, label: string, ink: string): Own => ({
  kind: 'reading',
  key: reading.key,
  label,
  value: typeof reading.value === 'number' ? reading.value : null,
  text: reading.value === null || typeof reading.value === 'number' ? null : String(reading.value),
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
})

const figureLine = (figure: ResultValue, ink: string): Own => ({
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

/** Written out: spreading both into a new object takes fifty times as long, and a download makes hundreds of thousands. */
const together = (shared: Shared, own: Own): BookValue => ({
  record: shared.record,
  version: shared.version,
  state: shared.state,
  sheet: shared.sheet,
  layout: shared.layout,
  trial_date: shared.trial_date,
  place: shared.place,
  tractor: shared.tractor,
  implement: shared.implement,
  kind: own.kind,
  key: own.key,
  label: own.label,
  value: own.value,
  text: own.text,
  unit: own.unit,
  u: own.u,
  expanded_u: own.expanded_u,
  k: own.k,
  formula: own.formula,
  made_from: own.made_from,
  formula_version: shared.formula_version,
  rules_version: shared.rules_version,
  origin: own.origin,
  cell: own.cell,
  settlement: own.settlement,
  settled_by: own.settled_by,
  settled_at: own.settled_at,
  why: own.why,
  ink: own.ink,
})

/** The flattened page with the part the cell takes up; the file itself where it came as a spreadsheet; null where no page shows it. */
function inkOf({ pageId, origin }: Reading, cell: CellFacts | undefined, at: string): string | null {
  if (!pageId) return null
  if (origin === 'spreadsheet') return `${at}/api/pages/${pageId}/original`
  return `${at}/api/pages/${pageId}/picture${cell?.fragment ?? ''}`
}

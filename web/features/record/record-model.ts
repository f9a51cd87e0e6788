/** What the record page says about readings and figures. Pure. */
import { formatValue } from '../../../shared/layouts/cell-value.ts'
import type { Layout, LayoutCell } from '../../../shared/layouts/layout.ts'
import type { ResultValue, TrialRecord } from '../../../shared/schemas/record.ts'
import type { Reading } from '../../../shared/schemas/sheet.ts'
import { type BudgetLine, sharesOf } from '../../../shared/trial/budget.ts'

export interface Sources {
  record: TrialRecord
  layout: Layout
  readings: ReadonlyMap<string, Reading>
  cells: ReadonlyMap<string, LayoutCell>
}

export const sourcesOf = (record: TrialRecord, layout: Layout): Sources => ({
  record,
  layout,
  readings: new Map(record.readings.map((r) => [r.key, r])),
  cells: new Map(layout.cells.map((c) => [c.key, c])),
})

/** The flattened page that shows a reading's ink, or null. */
export function pictureOf({ record, readings }: Sources, key: string): string | null {
  const reading = readings.get(key)
  if (!reading?.pageId || reading.cellRef) return null
  const page = record.pages.find((p) => p.id === reading.pageId)
  return page?.flattened ? `/api/pages/${page.id}/picture` : null
}

/** "2000 mL" */
export function valueWords({ cells }: Sources, reading: Reading): string {
  const text = formatValue(cells.get(reading.key), reading.value)
  return reading.unit && reading.value !== null ? `${text} ${reading.unit}` : text
}

/** Who stands behind a reading, in a few words. */
export function originWords(sources: Sources, reading: Reading): string {
  const { settlement, settledBy, why } = reading
  if (settlement === 'corrected') {
    const read = formatValue(sources.cells.get(reading.key), reading.readValue)
    return `${settledBy ?? 'a person'} wrote it for ${read}${why ? `: “${why}”` : ''}`
  }
  if (settlement) return `${settlement} by ${settledBy ?? 'a person'}${why ? `: “${why}”` : ''}`
  if (reading.origin === 'plan') return 'from the plan'
  if (reading.origin === 'person') return 'keyed beside the picture'
  return reading.cellRef ? `spreadsheet cell ${reading.cellRef}` : 'read from the ink'
}

/** The parts of a figure's uncertainty with their share of the variance, largest first (GUM 5.1.2). */
export function budgetOf(result: ResultValue | undefined): BudgetLine[] {
  const parts = (result?.budget ?? []).flatMap((p) =>
    typeof p.name === 'string' && typeof p.u === 'number' && p.u > 0 ? [{ name: p.name, u: p.u }] : [],
  )
  return sharesOf(parts)
}

/** The figure a run is made for: litres a hectare, or an hour where the sheet has no plot. */
export function mainFigureOf({ results }: Pick<TrialRecord, 'results'>): ResultValue | undefined {
  return results.l_per_ha?.reason?.code === 'not_on_sheet' ? results.l_per_h : results.l_per_ha
}

/** The readings of a repeated cell that hold a number, in order. */
export function repeatsOf({ readings }: Sources, stem: string): Array<{ key: string; value: number }> {
  return [...readings.values()]
    .flatMap(({ key, value }) => (key.startsWith(`${stem}[`) && typeof value === 'number' ? [{ key, value }] : []))
    .sort((a, b) => Number(a.key.slice(stem.length + 1, -1)) - Number(b.key.slice(stem.length + 1, -1)))
}

/** How many of these readings a person settled or keyed. */
export const byHandCount = ({ readings }: Sources, keys: readonly string[]): number =>
  keys.filter((key) => {
    const reading = readings.get(key)
    return reading !== undefined && (reading.settlement !== null || reading.origin === 'person')
  }).length

import { type FormRow, formRows } from '../../shared/layouts/form.ts'
import type { Layout } from '../../shared/layouts/layout.ts'
import { csvLine } from './csv-text.ts'

const COLUMNS: ReadonlyArray<[string, (row: FormRow) => string | number | null | undefined]> = [
  ['key', (row) => row.key],
  ['label', (row) => row.label],
  ['kind', (row) => row.kind],
  ['unit', (row) => row.unit ?? (row.unitBy ? `as ticked in ${row.unitBy}` : '')],
  ['format', (row) => ({ date: 'YYYY-MM-DD', time: 'HH:MM' })[row.kind as 'date' | 'time'] ?? row.format],
  ['options', (row) => row.options.map((o) => (o.option === o.label ? o.option : `${o.option} = ${o.label}`)).join('; ')],
  ['need', (row) => row.need],
  ['instrument', (row) => row.instrument],
  ['impossible_below', (row) => row.hard?.[0]],
  ['impossible_above', (row) => row.hard?.[1]],
  ['unlikely_below', (row) => row.plausible?.[0]],
  ['unlikely_above', (row) => row.plausible?.[1]],
]

/** The data dictionary of a layout as CSV (RFC 4180, UTF-8): one line a reading, limits in its unit. */
export function writeDictionary(layout: Layout): string {
  const lines = formRows(layout).map((row) => csvLine(COLUMNS.map(([, take]) => take(row) ?? '')))
  return csvLine(COLUMNS.map(([name]) => name)) + lines.join('')
}

/** The trial book as tables: wide (one line a record) and long (one line a value). */
import { type BookColumn, bookColumns } from '../../../shared/layouts/book-columns.ts'
import { type Column, headerOf } from '../../../shared/layouts/column.ts'
import { LAYOUTS } from '../../../shared/layouts/registry.ts'
import { valueColumns } from '../../../shared/layouts/value-columns.ts'
import type { BookValue } from '../../../shared/schemas/book-value.ts'
import type { Value } from '../../../shared/schemas/sheet.ts'
import { type BookRecord, bookRecords } from '../../db/desk/book-lines.ts'
import type { RecordFilter } from '../../db/desk/record-rows.ts'
import type { Deps } from '../../http/route.ts'
import type { Table } from '../../print/table.ts'
import { layoutName, valuesOf } from './value-lines.ts'

type TableDeps = Pick<Deps, 'source' | 'settings'>

export const recordColumns = (): BookColumn[] => bookColumns(LAYOUTS)

export function recordTable({ source }: TableDeps, filter: RecordFilter): Table {
  const columns = recordColumns()
  const lines = async function* () {
    for await (const record of bookRecords(source, filter)) yield [recordLine(columns, record)]
  }
  return { name: 'trial-book', columns, lines: lines() }
}

function recordLine(columns: readonly BookColumn[], record: BookRecord): Value[] {
  const fields: Record<string, Value> = {
    record: record.number,
    version: record.version,
    state: record.state,
    sheet: record.sheetCode,
    layout: layoutName(record),
    place: record.place,
    demonstrator: record.demonstrator,
    tractor: record.tractor,
    implement: record.implement,
    operation: record.operation,
    rules_version: record.rulesVersion,
    formula_version: record.formulaVersion,
    entered_at: record.enteredAt.toISOString(),
    entered_by: record.enteredBy,
  }
  const readings = new Map(record.readings.map((r) => [r.key, r.value]))
  return columns.map(({ source }) => {
    if (source.from === 'record') return fields[source.field] ?? null
    if (source.from === 'reading') return readings.get(source.key) ?? null
    return record.results[source.key]?.[source.part] ?? null
  })
}

export function valueTable({ source, settings }: TableDeps, filter: RecordFilter): Table {
  const columns = valueColumns()
  const names = columns.map((c) => c.name as keyof BookValue)
  const lines = async function* () {
    for await (const record of bookRecords(source, filter)) {
      yield valuesOf(record, settings.publicUrl).map((value) => names.map((name) => value[name]))
    }
  }
  return { name: 'trial-book-values', columns, lines: lines() }
}

/** What the columns mean, as a table of its own. */
export function dictionaryTable(name: string, described: readonly Column[]): Table {
  const text = (column: string, description: string): Column => ({ name: column, unit: null, kind: 'text', description })
  const lines = async function* () {
    yield described.map((c) => [headerOf(c), c.unit, c.kind, c.description])
  }
  return {
    name,
    columns: [text('column', 'its heading'), text('unit', ''), text('type', ''), text('description', '')],
    lines: lines(),
  }
}

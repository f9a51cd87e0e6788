/** The book for downloads: record by record from one query, so that it is of one moment, and memory stays flat. */
import QueryStream from 'pg-query-stream'
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { ResultValue } from '../../../shared/schemas/record.ts'
import type { Reading } from '../../../shared/schemas/sheet.ts'
import type { DataSource } from '../database.ts'
import { poolOf } from '../pool.ts'
import { type RecordFilter, whereOf } from './record-rows.ts'

export interface BookRecord {
  number: number
  version: number
  state: string
  /** As people see it on the sheet and on every screen. */
  sheetCode: string | null
  layoutKey: string
  layoutVersion: number
  trialDate: string | null
  place: string | null
  demonstrator: string | null
  tractor: string | null
  implement: string | null
  operation: string | null
  rulesVersion: string
  formulaVersion: string
  enteredAt: Date
  enteredBy: string
  readings: Reading[]
  results: Record<string, ResultValue>
}

const SELECT = `
SELECT rec.number, rec.version, rec.state, s.code AS "sheetCode", s.layout_key AS "layoutKey", s.layout_version AS "layoutVersion",
  rec.trial_date AS "trialDate", p.name AS place, d.name AS demonstrator, t.name AS tractor, i.name AS implement, i.operation,
  rec.rules_version AS "rulesVersion", rec.formula_version AS "formulaVersion", rec.entered_at AS "enteredAt",
  e.name AS "enteredBy", rec.readings, rec.results
FROM records rec JOIN sheets s ON s.id = rec.sheet_id JOIN users e ON e.id = rec.entered_by
  LEFT JOIN places p ON p.id = rec.place_id LEFT JOIN users d ON d.id = rec.demonstrator_id
  LEFT JOIN tractors t ON t.id = rec.tractor_id LEFT JOIN implements i ON i.id = rec.implement_id`

/** Records fetched at a time: each is some 50 kB with its readings and budgets. */
const BATCH = 20

/** The query of a download, for measuring it without us. */
export function bookQuery(filter: RecordFilter, limit: number | null = null): { text: string; values: unknown[] } {
  const values: unknown[] = []
  const where = whereOf(filter, values)
  const after = filter.after ? ` AND rec.number < $${values.push(filter.after)}` : ''
  const most = limit === null ? '' : ` LIMIT $${values.push(limit)}`
  return { text: `${SELECT} WHERE ${where}${after} ORDER BY rec.number DESC${most}`, values }
}

/** Newest first. Ending the loop early gives the connection back. */
export async function* bookRecords(
  source: DataSource,
  filter: RecordFilter,
  limit: number | null = null,
): AsyncGenerator<BookRecord> {
  const { text, values } = bookQuery(filter, limit)
  const client = await poolOf(source).connect()
  let broken: unknown
  try {
    const rows = client.query(new QueryStream(text, values, { batchSize: BATCH, highWaterMark: BATCH }))
    for await (const row of rows as AsyncIterable<BookRecord>) {
      yield { ...row, sheetCode: row.sheetCode && formatSheetCode(row.sheetCode) }
    }
  } catch (cause) {
    broken = cause
    throw cause
  } finally {
    client.release(broken !== undefined)
  }
}

import type { BookValue } from '../../../shared/schemas/book-value.ts'
import { bookRecords } from '../../db/desk/book-lines.ts'
import type { RecordFilter } from '../../db/desk/record-rows.ts'
import type { Deps } from '../../http/route.ts'
import { valuesOf } from './value-lines.ts'

/** The values of the next records; `next` is the last record's number, to go on after, or null at the end. */
export async function listValues(
  deps: Deps,
  filter: RecordFilter,
  records: number,
): Promise<{ values: BookValue[]; next: number | null }> {
  const values: BookValue[] = []
  let seen = 0
  let last: number | null = null
  for await (const record of bookRecords(deps.source, filter, records + 1)) {
    seen += 1
    if (seen > records) return { values, next: last }
    values.push(...valuesOf(record, deps.settings.publicUrl))
    last = record.number
  }
  return { values, next: null }
}

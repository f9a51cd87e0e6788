/** The book for downloads: one line a record, fetched a few hundred at a time so that memory stays flat. */
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { Value } from '../../../shared/schemas/sheet.ts'
import type { Db } from '../database.ts'
import { RecordEntity } from '../entities/record.ts'
import { listRecordRows, type RecordFilter } from './record-rows.ts'
import { namesOf } from './sheet-detail.ts'

export interface BookLine {
  fields: Record<string, Value>
  readings: Record<string, Value>
  results: Record<string, { value: number | null; U: number | null }>
}

const BATCH = 300

export async function* bookLines(db: Db, filter: RecordFilter): AsyncGenerator<BookLine> {
  let after = filter.after
  for (;;) {
    const { rows } = await listRecordRows(db, { ...filter, after }, BATCH)
    const last = rows.at(-1)
    if (!last) return
    const entities = await db.find(RecordEntity, { where: rows.map(({ number, version }) => ({ number, version })) })
    const byNumber = new Map(entities.map((e) => [e.number, e]))
    const names = await namesOf(
      db,
      entities.map((e) => e.enteredBy),
    )
    const layouts = await layoutsOf(
      db,
      rows.map((r) => r.sheetId),
    )
    for (const row of rows) {
      const entity = byNumber.get(row.number)
      if (!entity) continue
      yield {
        fields: {
          record: row.number,
          version: row.version,
          state: row.state,
          sheet: row.sheetCode && formatSheetCode(row.sheetCode),
          layout: layouts.get(row.sheetId) ?? null,
          place: row.place.name,
          demonstrator: row.demonstrator.name,
          tractor: row.tractor.name,
          implement: row.implement.name,
          operation: row.implement.operation,
          rules_version: entity.rulesVersion,
          formula_version: entity.formulaVersion,
          entered_at: entity.enteredAt.toISOString(),
          entered_by: names.get(entity.enteredBy) ?? null,
        },
        readings: Object.fromEntries(entity.readings.map((r) => [r.key, r.value])),
        results: entity.results,
      }
    }
    if (rows.length < BATCH) return
    after = last.number
  }
}

async function layoutsOf(db: Db, sheetIds: readonly string[]): Promise<Map<string, string>> {
  const rows: Array<{ id: string; layout: string }> = await db.query(
    `SELECT id, layout_key || ' ' || layout_version AS layout FROM sheets WHERE id = ANY($1)`,
    [[...sheetIds]],
  )
  return new Map(rows.map((r) => [r.id, r.layout]))
}

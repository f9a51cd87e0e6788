/** Records as the trial book shows them. */
import type { ListRecords, RecordRow } from '../../../shared/schemas/record.ts'
import type { Db } from '../database.ts'

interface Row extends Omit<RecordRow, 'place' | 'demonstrator' | 'tractor' | 'implement'> {
  placeId: string | null
  placeNumber: number | null
  placeName: string | null
  demonstratorId: string | null
  demonstratorNumber: number | null
  demonstratorName: string | null
  tractorId: string | null
  tractorNumber: number | null
  tractorName: string | null
  implementId: string | null
  implementNumber: number | null
  implementName: string | null
  operation: string | null
}

const SELECT = `
SELECT rec.number, rec.version, rec.state, rec.sheet_id AS "sheetId", s.code AS "sheetCode", rec.trial_date AS "trialDate",
  rec.gear, rec.soil_class AS "soilClass", rec.results,
  p.id AS "placeId", p.number AS "placeNumber", p.name AS "placeName",
  d.id AS "demonstratorId", d.number AS "demonstratorNumber", d.name AS "demonstratorName",
  t.id AS "tractorId", t.number AS "tractorNumber", t.name AS "tractorName",
  i.id AS "implementId", i.number AS "implementNumber", i.name AS "implementName", i.operation
FROM records rec JOIN sheets s ON s.id = rec.sheet_id
  LEFT JOIN places p ON p.id = rec.place_id LEFT JOIN users d ON d.id = rec.demonstrator_id
  LEFT JOIN tractors t ON t.id = rec.tractor_id LEFT JOIN implements i ON i.id = rec.implement_id`

export type RecordFilter = ListRecords & { demonstratorId?: string }

/** What a filter lets through, as SQL over `rec`, `s` and `i`; what it binds is added to `values`. */
export function whereOf(filter: RecordFilter, values: unknown[]): string {
  const bind = (value: unknown) => `$${values.push(value)}`
  const where = ["rec.state <> 'superseded'"]
  if (filter.demonstratorId) where.push(`s.owner_id = ${bind(filter.demonstratorId)}`)
  if (filter.find && /^\d{1,9}$/.test(filter.find)) where.push(`rec.number = ${bind(Number(filter.find))}`)
  else if (filter.find) {
    const part = filter.find.toUpperCase().replace(/[^0-9A-Z]/g, '')
    where.push(part === '' ? 'false' : `s.code LIKE ${bind(`%${part}%`)}`)
  }
  if (filter.tractor) where.push(`rec.tractor_id = ${bind(filter.tractor)}`)
  if (filter.implement) where.push(`rec.implement_id = ${bind(filter.implement)}`)
  if (filter.place) where.push(`rec.place_id = ${bind(filter.place)}`)
  if (filter.operation) where.push(`i.operation = ${bind(filter.operation)}`)
  if (filter.soil) where.push(`rec.soil_class = ${bind(filter.soil)}`)
  if (filter.from) where.push(`rec.trial_date >= ${bind(filter.from)}`)
  if (filter.to) where.push(`rec.trial_date <= ${bind(filter.to)}`)
  return where.join(' AND ')
}

/** Newest number first; `after` is the last number seen. */
export async function listRecordRows(db: Db, filter: RecordFilter, limit: number): Promise<{ rows: RecordRow[]; total: number }> {
  const values: unknown[] = []
  const where = whereOf(filter, values)
  const counted: Array<{ n: number }> = await db.query(
    `SELECT count(*)::int AS n FROM records rec JOIN sheets s ON s.id = rec.sheet_id LEFT JOIN implements i ON i.id = rec.implement_id WHERE ${where}`,
    values,
  )
  const after = filter.after ? ` AND rec.number < $${values.push(filter.after)}` : ''
  const rows: Row[] = await db.query(
    `${SELECT} WHERE ${where}${after} ORDER BY rec.number DESC LIMIT $${values.push(limit)}`,
    values,
  )
  return { rows: rows.map(toRow), total: counted[0]!.n }
}

export async function findRecordRow(db: Db, number: number, version: number): Promise<RecordRow | null> {
  const rows: Row[] = await db.query(`${SELECT} WHERE rec.number = $1 AND rec.version = $2`, [number, version])
  return rows[0] ? toRow(rows[0]) : null
}

/** The records of these numbers as they stand in the book now. */
export async function listStandingRows(db: Db, numbers: readonly number[]): Promise<RecordRow[]> {
  const values: unknown[] = []
  const where = whereOf({}, values)
  const rows: Row[] = await db.query(`${SELECT} WHERE ${where} AND rec.number = ANY($${values.push(numbers)})`, values)
  return rows.map(toRow)
}

const toRow = (r: Row): RecordRow => ({
  number: r.number,
  version: r.version,
  state: r.state,
  sheetId: r.sheetId,
  sheetCode: r.sheetCode,
  trialDate: r.trialDate,
  gear: r.gear,
  soilClass: r.soilClass,
  results: r.results,
  place: { id: r.placeId, number: r.placeNumber, name: r.placeName ?? '' },
  demonstrator: { id: r.demonstratorId, number: r.demonstratorNumber, name: r.demonstratorName ?? '' },
  tractor: { id: r.tractorId, number: r.tractorNumber, name: r.tractorName ?? '' },
  implement: { id: r.implementId, number: r.implementNumber, name: r.implementName ?? '', operation: r.operation },
})

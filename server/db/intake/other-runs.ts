/** What earlier runs and sheets say of a sheet: its tractor's hours, its like in the book, what it may repeat. */
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { Values } from '../../../shared/schemas/sheet.ts'
import type { OtherSheet } from '../../../shared/trial/facts.ts'
import { gearOf } from '../../../shared/trial/gear.ts'
import type { Db } from '../database.ts'
import { PlaceEntity } from '../entities/register.ts'
import type { SheetEntity } from '../entities/sheet.ts'
import type { Named } from './sheet-facts.ts'

/** Fewer records of an operation say nothing about what is usual here. */
const LEAST_FOR_USUAL = 8

export async function lastHourMeter(db: Db, sheet: SheetEntity, tractorId: string, trialDate: unknown): Promise<number | null> {
  if (typeof trialDate !== 'string') return null
  const rows: Array<{ end: number | null }> = await db.query(
    `SELECT max((r->>'value')::float8) AS end FROM records, jsonb_array_elements(readings) r
     WHERE tractor_id = $1 AND trial_date < $2 AND sheet_id <> $3 AND state = 'entered' AND r->>'key' = 'hour_meter_end'`,
    [tractorId, trialDate, sheet.id],
  )
  return rows[0]?.end ?? null
}

/** Sheets this one may be a copy of, or clash with: the same code with other ink, and that day's others of its tractor or demonstrator. */
export async function otherSheets(db: Db, sheet: SheetEntity, named: Named, trialDate: unknown): Promise<OtherSheet[]> {
  const { tractor, demonstrator, place } = named
  const rows: Array<{ id: string; code: string | null; values: Values }> = await db.query(
    `SELECT s.id, s.code, jsonb_object_agg(r.key, r.value) AS values FROM sheets s JOIN readings r ON r.sheet_id = s.id
     WHERE s.id <> $1 AND s.state NOT IN ('set aside', 'printed', 'unreadable') AND (s.code = $2 OR s.id IN (
       SELECT t.sheet_id FROM readings t JOIN readings d ON d.sheet_id = t.sheet_id
       WHERE (t.key = 'tractor_id' AND t.value = to_jsonb($3::int) OR t.key = 'demonstrator_id' AND t.value = to_jsonb($5::int))
         AND d.key = 'trial_date' AND d.value = to_jsonb($4::text)))
     GROUP BY s.id`,
    [sheet.id, sheet.code, tractor?.number ?? -1, typeof trialDate === 'string' ? trialDate : '', demonstrator?.number ?? -1],
  )
  const places = new Map((await db.find(PlaceEntity)).map((row) => [row.number, row]))
  return rows.map(({ code, values }) => ({
    sheetCode: code ? formatSheetCode(code) : 'without a code',
    sameCode: code !== null && code === sheet.code,
    tractorSerial: tractor && values.tractor_id === tractor.number ? tractor.serial : null,
    demonstratorId: typeof values.demonstrator_id === 'number' ? values.demonstrator_id : null,
    trialDate: typeof values.trial_date === 'string' ? values.trial_date : null,
    start: typeof values.t_start === 'string' ? values.t_start : null,
    end: typeof values.t_end === 'string' ? values.t_end : null,
    distance_km: kilometresBetween(place, places.get(Number(values.place_id)) ?? null),
    readings: values,
  }))
}

/** L/ha of entered records with the same tractor, implement, gear and soil. */
export async function peersOf(
  db: Db,
  sheetId: string,
  tractorId: string,
  implementId: string,
  values: Values,
): Promise<number[]> {
  const rows: Array<{ value: number }> = await db.query(
    `SELECT (results->'l_per_ha'->>'value')::float8 AS value FROM records
     WHERE state = 'entered' AND sheet_id <> $1 AND tractor_id = $2 AND implement_id = $3 AND gear IS NOT DISTINCT FROM $4
       AND soil_class IS NOT DISTINCT FROM $5 AND results->'l_per_ha'->>'value' IS NOT NULL ORDER BY number`,
    [sheetId, tractorId, implementId, gearOf(values), typeof values.soil_class === 'string' ? values.soil_class : null],
  )
  return rows.map((row) => row.value)
}

/** Median L/ha of the operation in this book; null before there are enough. */
export async function usualOf(db: Db, sheetId: string, operation: string): Promise<number | null> {
  const rows: Array<{ n: number; median: number | null }> = await db.query(
    `SELECT count(*) AS n, percentile_cont(0.5) WITHIN GROUP (ORDER BY (r.results->'l_per_ha'->>'value')::float8) AS median
     FROM records r JOIN implements i ON i.id = r.implement_id
     WHERE r.state = 'entered' AND r.sheet_id <> $1 AND i.operation = $2 AND r.results->'l_per_ha'->>'value' IS NOT NULL`,
    [sheetId, operation],
  )
  const [row] = rows
  return row && row.n >= LEAST_FOR_USUAL ? row.median : null
}

/** Sheets whose depths are looked at together: enough for the last digits, and of these days. */
const POOLED_RECORDS = 20

/** Depths of the demonstrator's latest records, cm. */
export async function pooledDepths(db: Db, sheetId: string, demonstratorId: string): Promise<number[]> {
  const rows: Array<{ depth: number }> = await db.query(
    `SELECT (r->>'value')::float8 AS depth
     FROM (SELECT readings FROM records WHERE state = 'entered' AND sheet_id <> $1 AND demonstrator_id = $2
       ORDER BY number DESC LIMIT ${POOLED_RECORDS}) latest, jsonb_array_elements(readings) r
     WHERE r->>'key' LIKE 'depth\\_cm[%' AND jsonb_typeof(r->'value') = 'number'`,
    [sheetId, demonstratorId],
  )
  return rows.map((row) => row.depth)
}

/** Kilometres between two places as the crow flies; null where one has no coordinates. */
function kilometresBetween(a: PlaceEntity | null, b: PlaceEntity | null): number | null {
  if (a?.lat == null || a.lon == null || b?.lat == null || b.lon == null) return null
  const rad = Math.PI / 180
  const half = (from: number, to: number) => Math.sin(((to - from) * rad) / 2) ** 2
  const h = half(a.lat, b.lat) + Math.cos(a.lat * rad) * Math.cos(b.lat * rad) * half(a.lon, b.lon)
  return 2 * 6371 * Math.asin(Math.sqrt(h))
}

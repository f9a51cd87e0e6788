/** What the registers know of a sheet: looked up by the numbers on it, and handed to rules and formulas. */
import type { Finding } from '../../../shared/checks/rule.ts'
import { formatSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { Values } from '../../../shared/schemas/sheet.ts'
import type { Facts, OtherSheet } from '../../../shared/trial/facts.ts'
import type { Db } from '../database.ts'
import { ImplementEntity, KitEntity, PlaceEntity, TractorEntity } from '../entities/register.ts'
import type { SheetEntity } from '../entities/sheet.ts'
import { UserEntity } from '../entities/user.ts'

export interface Named {
  place: PlaceEntity | null
  tractor: TractorEntity | null
  implement: ImplementEntity | null
  kit: KitEntity | null
  demonstrator: UserEntity | null
}

const REGISTER_CELLS = {
  place: 'place_id',
  tractor: 'tractor_id',
  implement: 'implement_id',
  kit: 'kit_id',
  demonstrator: 'demonstrator_id',
} as const
const WORDS = { place: 'place', tractor: 'tractor', implement: 'implement', kit: 'kit', demonstrator: 'demonstrator' } as const

/** The rows the sheet's numbers name; null where blank or unknown. */
export async function namedOnSheet(db: Db, values: Values): Promise<Named> {
  const number = (key: string) => (typeof values[key] === 'number' ? (values[key] as number) : null)
  const find = async <T extends { number: number }>(entity: new () => T, key: string): Promise<T | null> => {
    const n = number(key)
    return n === null ? null : db.getRepository(entity).findOne({ where: { number: n } as never })
  }
  return {
    place: await find(PlaceEntity, 'place_id'),
    tractor: await find(TractorEntity, 'tractor_id'),
    implement: await find(ImplementEntity, 'implement_id'),
    kit: await find(KitEntity, 'kit_id'),
    demonstrator: await find(UserEntity, 'demonstrator_id'),
  }
}

/** A number on the sheet that no register holds is a doubt: the facts behind it are missing. */
export function registerFindings(values: Values, named: Named): Finding[] {
  return (Object.keys(REGISTER_CELLS) as Array<keyof typeof REGISTER_CELLS>).flatMap((noun) => {
    const key = REGISTER_CELLS[noun]
    const number = values[key]
    if (typeof number !== 'number' || named[noun]) return []
    const text = `No ${WORDS[noun]} has the number ${number}: correct it, or have it entered in the register.`
    return [{ rule: 'register', version: 1, severity: 'doubt' as const, cells: [key], text, compared: { number } }]
  })
}

/** Facts as shared/trial wants them. `today` is the database's day. */
export async function factsOf(db: Db, sheet: SheetEntity, values: Values, named: Named): Promise<Facts> {
  const { tractor, implement, kit } = named
  const clock: Array<{ today: string }> = await db.query('SELECT current_date::text AS today')
  return {
    ratedWidth_m: implement?.ratedWidth_m ?? null,
    operation: implement?.operation ?? null,
    maxDepth_cm: implement?.maxDepth_cm ?? null,
    ratedPower_kw: tractor?.ratedPower_kw ?? null,
    ptoPower_kw: tractor?.ptoPower_kw ?? null,
    ratedRpm: tractor?.ratedRpm ?? null,
    drive: tractor?.drive ?? null,
    hourMeterKind: tractor?.hourMeterKind ?? null,
    jarCapacity_ml: kit?.jarCapacity_ml ?? null,
    jarMark_ml: kit?.jarMark_ml ?? null,
    jugCapacity_ml: kit?.jugCapacity_ml ?? null,
    jugMark_ml: kit?.jugMark_ml ?? null,
    ruleReach_cm: kit?.ruleLength_cm ?? null,
    kitCheckedOn: kit?.checkedOn ?? null,
    today: clock[0]!.today,
    arrivedOn: sheet.arrivedAt?.toISOString().slice(0, 10) ?? null,
    sheetCode: sheet.code,
    tractorSerial: tractor?.serial ?? null,
    lastHourMeter_h: tractor ? await lastHourMeter(db, sheet, tractor.id, values.trial_date) : null,
    otherSheets: await otherSheets(db, sheet, tractor, values.trial_date),
  }
}

async function lastHourMeter(db: Db, sheet: SheetEntity, tractorId: string, trialDate: unknown): Promise<number | null> {
  if (typeof trialDate !== 'string') return null
  const rows: Array<{ end: number | null }> = await db.query(
    `SELECT max((r->>'value')::float8) AS end FROM records, jsonb_array_elements(readings) r
     WHERE tractor_id = $1 AND trial_date < $2 AND sheet_id <> $3 AND state = 'entered' AND r->>'key' = 'hour_meter_end'`,
    [tractorId, trialDate, sheet.id],
  )
  return rows[0]?.end ?? null
}

/** Sheets this one may be a copy of: the same code with other ink, and the tractor's other sheets of that day. */
async function otherSheets(db: Db, sheet: SheetEntity, tractor: TractorEntity | null, trialDate: unknown): Promise<OtherSheet[]> {
  const rows: Array<{ id: string; code: string | null; values: Values }> = await db.query(
    `SELECT s.id, s.code, jsonb_object_agg(r.key, r.value) AS values FROM sheets s JOIN readings r ON r.sheet_id = s.id
     WHERE s.id <> $1 AND s.state NOT IN ('set aside', 'printed', 'unreadable') AND (s.code = $2 OR s.id IN (
       SELECT t.sheet_id FROM readings t JOIN readings d ON d.sheet_id = t.sheet_id
       WHERE t.key = 'tractor_id' AND t.value = to_jsonb($3::int) AND d.key = 'trial_date' AND d.value = to_jsonb($4::text)))
     GROUP BY s.id`,
    [sheet.id, sheet.code, tractor?.number ?? -1, typeof trialDate === 'string' ? trialDate : ''],
  )
  return rows.map(({ code, values }) => ({
    sheetCode: code ? formatSheetCode(code) : 'without a code',
    sameCode: code !== null && code === sheet.code,
    tractorSerial: tractor && values.tractor_id === tractor.number ? tractor.serial : null,
    demonstratorId: typeof values.demonstrator_id === 'number' ? values.demonstrator_id : null,
    trialDate: typeof values.trial_date === 'string' ? values.trial_date : null,
    start: typeof values.t_start === 'string' ? values.t_start : null,
    end: typeof values.t_end === 'string' ? values.t_end : null,
    readings: values,
  }))
}

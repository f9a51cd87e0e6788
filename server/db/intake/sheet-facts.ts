/** What the registers know of a sheet: looked up by the numbers on it, and handed to rules and formulas. */
import type { Finding } from '../../../shared/checks/rule.ts'
import type { Values } from '../../../shared/schemas/sheet.ts'
import type { Facts } from '../../../shared/trial/facts.ts'
import { gearOf, gearSpeedOf } from '../../../shared/trial/gear.ts'
import type { Db } from '../database.ts'
import { ImplementEntity, KitEntity, PlaceEntity, TractorEntity } from '../entities/register.ts'
import type { SheetEntity } from '../entities/sheet.ts'
import { UserEntity } from '../entities/user.ts'
import { landUnitsOf } from '../repositories/land-unit.ts'
import { currentLimits } from '../repositories/limit-settings.ts'
import { lastHourMeter, otherSheets, peersOf, pooledDepths, usualOf } from './other-runs.ts'

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
    const text = `No ${WORDS[noun]} has the number ${number}: correct it, or ask the admin to add it to the register.`
    return [{ rule: 'register', version: 1, severity: 'doubt' as const, cells: [key], text, compared: { number } }]
  })
}

/** Facts as shared/trial wants them. `today` is the database's day. */
export async function factsOf(db: Db, sheet: SheetEntity, values: Values, named: Named): Promise<Facts> {
  const { place, tractor, implement, kit, demonstrator } = named
  const settings = await currentLimits(db)
  const operation = implement?.operation ?? null
  const clock: Array<{ today: string }> = await db.query('SELECT current_date::text AS today')
  return {
    ratedWidth_m: implement?.ratedWidth_m ?? null,
    operation,
    toolCount: implement?.toolCount ?? null,
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
    kitScale_pct: kit?.scale_pct ?? null,
    ruleReach_cm: kit?.ruleLength_cm ?? null,
    kitCheckedOn: kit?.checkedOn ?? null,
    density15_kgm3: place?.density15_kgm3 ?? null,
    rollingCircumference_m: tractor?.rollingCircumference_m ?? null,
    gearSpeed_km_h: tractor ? gearSpeedOf(tractor.gearSpeeds, gearOf(values)) : null,
    landUnits: place ? await landUnitsOf(db, place.district) : null,
    peers_l_per_ha: tractor && implement ? await peersOf(db, sheet.id, tractor.id, implement.id, values) : null,
    usual_l_per_ha: operation ? await usualOf(db, sheet.id, operation) : null,
    pooledDepths_cm: demonstrator ? await pooledDepths(db, sheet.id, demonstrator.id) : null,
    limits: settings.limits,
    settingsVersion: settings.version,
    today: clock[0]!.today,
    arrivedOn: sheet.arrivedAt?.toISOString().slice(0, 10) ?? null,
    sheetCode: sheet.code,
    tractorSerial: tractor?.serial ?? null,
    lastHourMeter_h: tractor ? await lastHourMeter(db, sheet, tractor.id, values.trial_date) : null,
    otherSheets: await otherSheets(db, sheet, named, values.trial_date),
  }
}

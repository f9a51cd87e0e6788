/** What registers and plan know of a run. All optional: a result that lacks a fact is null and says so. */
import { z } from 'zod'
import { convert, quantity, unitFromTick } from './quantity.ts'
import { numberAt, type Readings, textAt } from './readings.ts'

export const OPERATIONS = [
  'plough',
  'disc',
  'cultivator',
  'rotary_tiller',
  'harrow',
  'subsoiler',
  'transport',
  'pto_work',
] as const
export type Operation = (typeof OPERATIONS)[number]

const number = z.number().nullish()
const text = z.string().nullish()
const range_kpa = z.tuple([z.number(), z.number()]).readonly().nullish()

const readingsSchema = z.record(z.string(), z.union([z.number(), z.string(), z.boolean(), z.null()]))

/** Another sheet this one may be a copy of, or may clash with. */
const otherSheetSchema = z.strictObject({
  sheetCode: z.string(),
  /** Same code, other ink. */
  sameCode: z.boolean().optional(),
  tractorSerial: text,
  demonstratorId: number,
  trialDate: text,
  start: text,
  end: text,
  imageHash: text,
  /** From this sheet's place to that one's. */
  distance_km: number,
  readings: readingsSchema.nullish(),
})
export type OtherSheet = z.infer<typeof otherSheetSchema>

/** A local unit of land. Only one a person confirmed for the district makes square metres. */
const landUnitSchema = z.strictObject({ name: z.string(), size_m2: z.number().positive(), confirmedBy: text, confirmedOn: text })
export type LandUnit = z.infer<typeof landUnitSchema>

/** What registers and plan know of a run, all optional. Strict: a fact nobody knows is refused and not silently left out. */
export const factsSchema = z.strictObject({
  ratedWidth_m: number,
  operation: z.enum(OPERATIONS).nullish(),
  /** Bottoms, tines or discs. */
  toolCount: number,
  /** Greatest depth the implement can work. */
  maxDepth_cm: number,
  ratedPower_kw: number,
  ptoPower_kw: number,
  ratedRpm: number,
  drive: z.enum(['2WD', '4WD']).nullish(),
  hourMeterKind: z.enum(['electronic', 'mechanical']).nullish(),
  jarCapacity_ml: number,
  jarMark_ml: number,
  jugCapacity_ml: number,
  jugMark_ml: number,
  /** Half-width of the scale error of jar and jug by their calibration, %. */
  kitScale_pct: number,
  /** Step of the balance a jar is weighed on, g. */
  balanceStep_g: number,
  kitCheckedOn: text,
  today: text,
  /** The day the sheet arrived. */
  arrivedOn: text,
  density15_kgm3: number,
  /** Correct a hydrometer reading for the glass it is made of (off when not told). */
  hydrometerGlass: z.boolean().nullish(),
  airTemp_c: number,
  /** Per litre, and per hour for driver and machine, in one currency. */
  fuelPrice_per_l: number,
  labour_per_h: number,
  machine_per_h: number,
  /** Makers' load table, kPa. */
  tyreLimits_kpa: z.strictObject({ front: range_kpa, rear: range_kpa }).nullish(),
  /** Speed in the gear written, at rated engine speed without slip. */
  gearSpeed_km_h: number,
  /** Way of one turn of the driven wheel. */
  rollingCircumference_m: number,
  /** Last hour meter reading known for this tractor at an earlier date. */
  lastHourMeter_h: number,
  /** The reach of the depth rule, cm (30 when not told). */
  ruleReach_cm: number,
  /** Usual L/ha of this operation here, a median of at least 8 records. */
  usual_l_per_ha: number,
  /** L/ha of earlier records with the same tractor, implement, gear and soil. */
  peers_l_per_ha: z.array(z.number()).readonly().nullish(),
  /** Depths of earlier sheets by the same demonstrator, for the last-digit check. */
  pooledDepths_cm: z.array(z.number()).readonly().nullish(),
  /** Local units of land of the district. */
  landUnits: z.array(landUnitSchema).readonly().nullish(),
  /** Limits the office has set, and the version they are of (0: as the product ships). */
  limits: z.record(z.string(), z.number()).nullish(),
  settingsVersion: number,
  sheetCode: text,
  tractorSerial: text,
  imageHash: text,
  photoTakenOn: text,
  /** How far the photo was taken from the place, km. */
  photoDistance_km: number,
  /** Sheets this one may repeat or clash with: the same code, day, tractor or demonstrator. */
  otherSheets: z.array(otherSheetSchema).readonly().nullish(),
})
export type Facts = z.infer<typeof factsSchema>

/** Keys of readings that stand for a fact when the register is silent (a file handed in by itself). */
const FROM_READINGS = {
  ratedWidth_m: 'rated_width_m',
  ratedPower_kw: 'rated_power_kw',
  ptoPower_kw: 'pto_power_kw',
  ratedRpm: 'rated_rpm',
  density15_kgm3: 'density_15',
  fuelPrice_per_l: 'fuel_price',
  toolCount: 'tool_count',
  airTemp_c: 'air_temp_c',
} as const

/** Horsepower comes in two sizes, 1.4 % apart: the tick beside the number says which. */
function ratedPower(readings: Readings): number | null {
  const [power, unit] = [numberAt(readings, FROM_READINGS.ratedPower_kw), textAt(readings, 'rated_power_unit')]
  return power === null || unit === null ? power : inKilowatts(power, unit)
}

function inKilowatts(power: number, text: string): number {
  const unit = unitFromTick('power', text)
  return convert(quantity(power, unit), unit, 'kW')
}

/** Facts with their gaps filled from readings that hold the same thing. The register wins. */
export function factsWithReadings(readings: Readings, facts: Facts): Facts {
  const filled: Facts = { ...facts }
  for (const [fact, key] of Object.entries(FROM_READINGS) as Array<[keyof typeof FROM_READINGS, string]>) {
    filled[fact] ??= fact === 'ratedPower_kw' ? ratedPower(readings) : numberAt(readings, key)
  }
  const drive = textAt(readings, 'drive')
  if (!filled.drive && (drive === '2WD' || drive === '4WD')) filled.drive = drive
  const operation = textAt(readings, 'operation')
  filled.operation ??= OPERATIONS.find((known) => known === operation) ?? null
  return filled
}

/** PTO power over rated engine power where no test report is known [P]. */
export const PTO_SHARE = 0.86

/** Rated PTO power, kW: from a test report, else a share of the engine's; null when neither is known. */
export const ptoPowerOf = (facts: Facts, share: number = PTO_SHARE): number | null =>
  facts.ptoPower_kw ?? (facts.ratedPower_kw == null ? null : share * facts.ratedPower_kw)

/** A kit no register tells of: common practice, a default and no standard. A result that leans on it says so. */
export const USUAL_KIT = {
  jarCapacity_ml: 5000,
  jarMark_ml: 200,
  jugCapacity_ml: 1000,
  jugMark_ml: 100,
  kitScale_pct: 1,
} as const

export interface Kit {
  jarCapacity_ml: number
  jarMark_ml: number
  jugCapacity_ml: number
  jugMark_ml: number
  kitScale_pct: number
}

/** The kit's figures, from the register where it has them. */
export function kitOf(facts: Facts): Kit {
  return {
    jarCapacity_ml: facts.jarCapacity_ml ?? USUAL_KIT.jarCapacity_ml,
    jarMark_ml: facts.jarMark_ml ?? USUAL_KIT.jarMark_ml,
    jugCapacity_ml: facts.jugCapacity_ml ?? USUAL_KIT.jugCapacity_ml,
    jugMark_ml: facts.jugMark_ml ?? USUAL_KIT.jugMark_ml,
    kitScale_pct: facts.kitScale_pct ?? USUAL_KIT.kitScale_pct,
  }
}

/** Which figures of the kit are assumed, in words. */
export function kitAssumptions(facts: Facts): string[] {
  const said: string[] = []
  if (facts.jarMark_ml == null) said.push(`jar marked each ${USUAL_KIT.jarMark_ml} mL`)
  if (facts.jugMark_ml == null) said.push(`jug marked each ${USUAL_KIT.jugMark_ml} mL`)
  if (facts.kitScale_pct == null) said.push(`scale of jar and jug within ${USUAL_KIT.kitScale_pct} %`)
  return said
}

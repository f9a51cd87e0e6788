/** What registers and plan know of a run. All optional: a result that lacks a fact is null and says so. */
import { numberAt, type Readings, textAt } from './readings.ts'

export const OPERATIONS = ['plough', 'disc', 'cultivator', 'rotary_tiller', 'harrow', 'subsoiler'] as const
export type Operation = (typeof OPERATIONS)[number]

export interface Facts {
  ratedWidth_m?: number | null
  operation?: Operation | null
  /** Greatest depth the implement can work. */
  maxDepth_cm?: number | null
  ratedPower_kw?: number | null
  ptoPower_kw?: number | null
  ratedRpm?: number | null
  drive?: '2WD' | '4WD' | null
  hourMeterKind?: 'electronic' | 'mechanical' | null
  jarCapacity_ml?: number | null
  jarMark_ml?: number | null
  jugCapacity_ml?: number | null
  jugMark_ml?: number | null
  /** Half-width of the scale error of jar and jug by their calibration, %. */
  kitScale_pct?: number | null
  kitCheckedOn?: string | null
  today?: string | null
  /** The day the sheet arrived. */
  arrivedOn?: string | null
  density15_kgm3?: number | null
  airTemp_c?: number | null
  /** Makers' load table, kPa. */
  tyreLimits_kpa?: { front?: readonly [number, number]; rear?: readonly [number, number] } | null
  /** Speed in the gear written, at rated engine speed without slip. */
  gearSpeed_km_h?: number | null
  /** Way of one turn of the driven wheel. */
  rollingCircumference_m?: number | null
  /** Last hour meter reading known for this tractor at an earlier date. */
  lastHourMeter_h?: number | null
  /** The reach of the depth rule, cm (30 when not told). */
  ruleReach_cm?: number | null
  /** Usual L/ha of this operation here, a median of at least 8 records. */
  usual_l_per_ha?: number | null
  /** L/ha of earlier records with the same tractor, implement, gear and soil. */
  peers_l_per_ha?: readonly number[] | null
  /** Depths of earlier sheets by the same demonstrator, for the last-digit check. */
  pooledDepths_cm?: readonly number[] | null
  /** Local units of land of the district, as a person chose them. */
  landUnits?: ReadonlyArray<{ name: string; size_m2: number }> | null
  sheetCode?: string | null
  tractorSerial?: string | null
  imageHash?: string | null
  photoTakenOn?: string | null
  /** How far the photo was taken from the place, km. */
  photoDistance_km?: number | null
  /** Sheets this one may repeat or clash with: the same code, day, tractor or demonstrator. */
  otherSheets?: readonly OtherSheet[] | null
}

/** Another sheet this one may be a copy of, or may clash with. */
export interface OtherSheet {
  sheetCode: string
  /** Same code, other ink. */
  sameCode?: boolean
  tractorSerial?: string | null
  demonstratorId?: number | null
  trialDate?: string | null
  start?: string | null
  end?: string | null
  imageHash?: string | null
  /** From this sheet's place to that one's. */
  distance_km?: number | null
  readings?: Readings | null
}

/** Keys of readings that stand for a fact when the register is silent (a file handed in by itself). */
const FROM_READINGS = {
  ratedWidth_m: 'rated_width_m',
  ratedPower_kw: 'rated_power_kw',
  ptoPower_kw: 'pto_power_kw',
  ratedRpm: 'rated_rpm',
  density15_kgm3: 'density_15',
  airTemp_c: 'air_temp_c',
} as const

/** Facts with their gaps filled from readings that hold the same thing. The register wins. */
export function factsWithReadings(readings: Readings, facts: Facts): Facts {
  const filled: Facts = { ...facts }
  for (const [fact, key] of Object.entries(FROM_READINGS) as Array<[keyof typeof FROM_READINGS, string]>) {
    filled[fact] ??= numberAt(readings, key)
  }
  const drive = textAt(readings, 'drive')
  if (!filled.drive && (drive === '2WD' || drive === '4WD')) filled.drive = drive
  const operation = textAt(readings, 'operation')
  filled.operation ??= OPERATIONS.find((known) => known === operation) ?? null
  return filled
}

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

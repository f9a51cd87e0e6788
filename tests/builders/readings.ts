/**
 * The golden sheet of the method (a ploughing run with every figure worked out by hand), as readings and facts. Builders give
 * a valid sheet; a test names only what it changes.
 */

import type { CheckOptions } from '../../shared/checks/context.ts'
import { checkOptions } from '../../shared/checks/judge-sheet.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Facts } from '../../shared/trial/facts.ts'
import type { Readings, ReadingValue } from '../../shared/trial/readings.ts'
import { CHECKS } from './checks.ts'

/** All 20 depths and 10 widths of the golden sheet; the printed layout holds the first 10 and the first 5. */
export const GOLDEN_DEPTHS_CM = [14.5, 15, 15.5, 14, 16, 15, 14.5, 15.5, 16.5, 15, 14, 15.5, 15, 14.5, 16, 15.5, 15, 14.5, 15, 16]
export const GOLDEN_WIDTHS_M = [0.88, 0.92, 0.9, 0.91, 0.93, 0.89, 0.9, 0.92, 0.9, 0.9]

export const numbered = (stem: string, values: readonly ReadingValue[]): Record<string, ReadingValue> =>
  Object.fromEntries(values.map((value, i) => [`${stem}[${i + 1}]`, value]))

const TICKED = [...CHECKS, 'sign_demonstrator', 'sign_operator', 'sign_farmer']

/** The short golden sheet: what fits layout `tillage` 1. Depth 15.15 cm, width 0.908 m, 14.0741 L/ha, 9.28982 mL/m³. */
const SHORT: Readings = {
  trial_date: '2026-10-14',
  place_id: 21,
  demonstrator_id: 7,
  tractor_id: 12,
  implement_id: 31,
  kit_id: 4,
  ...Object.fromEntries(TICKED.map((key) => [key, true])),
  fuel_method: 'D',
  gear_range: 'L',
  gear: 3,
  hour_meter_start: 1204.3,
  hour_meter_end: 1205.2,
  warmup_min: 20,
  bystander_line_m: 25,
  tyre_p_fl: 28,
  tyre_p_fr: 28,
  tyre_p_rl: 16,
  tyre_p_rr: 16,
  tyre_p_unit: 'psi',
  jar_start_t: '09:10',
  jar_end_t: '10:02',
  'topup_t[1]': '09:38',
  'topup_t[2]': null,
  'topup_t[3]': null,
  fuel_temp_start_c: 32,
  fuel_temp_end_c: 41,
  'topup_temp_c[1]': 34,
  'topup_temp_c[2]': null,
  'topup_temp_c[3]': null,
  jar_start_ml: 4800,
  jar_end_ml: 2000,
  'topup_ml[1]': 1000,
  'topup_ml[2]': null,
  'topup_ml[3]': null,
  fuel_used_written_ml: 3800,
  l_per_ha_written: 14.07,
  t_start: '09:10',
  t_end: '10:02',
  pass_count: 50,
  ...numbered('stop_from', [null, null, null]),
  ...numbered('stop_to', [null, null, null]),
  ...numbered('stop_engine_off', [false, false, false]),
  side_ab_m: 60,
  side_bc_m: 45,
  side_cd_m: null,
  side_da_m: null,
  diag_ac_m: 75,
  diag_bd_m: null,
  area_written: 0.27,
  area_unit: 'ha',
  ...numbered('depth_cm', GOLDEN_DEPTHS_CM.slice(0, 10)),
  depth_mean_written_cm: 15.2,
  ...numbered('width_m', GOLDEN_WIDTHS_M.slice(0, 5)),
  width_mean_written_m: 0.908,
  rpm_noload: 1700,
  rpm_load: 1600,
  speed_dist_m: 20,
  ...numbered('speed_t_s', [16.4, 16.1, 16.6]),
  rev_n: 10,
  ...numbered('dist_load_m', [36.8, 37]),
  ...numbered('dist_noload_m', [42.2, 42.4]),
  soil_class: 'medium',
  consent_trial: 'yes',
  consent_photo: 'yes',
  consent_contact: 'no',
  circuit_restored_at: '10:40',
  closed_at: '10:55',
  circuit_restored_by: null,
  remarks: null,
  sign_witness: false,
}

const FACTS: Facts = {
  ratedWidth_m: 0.9,
  operation: 'plough',
  maxDepth_cm: 28,
  ratedPower_kw: 37,
  ptoPower_kw: 32,
  ratedRpm: 2200,
  drive: '2WD',
  hourMeterKind: 'electronic',
  jarCapacity_ml: 5000,
  jarMark_ml: 200,
  jugCapacity_ml: 1000,
  jugMark_ml: 100,
  kitScale_pct: 1,
  kitCheckedOn: '2026-06-02',
  today: '2026-10-16',
  arrivedOn: '2026-10-15',
  density15_kgm3: 832,
}

/** The short golden sheet with changes; `undefined` takes a cell off the sheet, null leaves it blank. */
export const buildReadings = (changes: Readings = {}): Readings => ({ ...SHORT, ...changes })

/** The golden sheet with all its depths and widths. */
export const buildFullReadings = (changes: Readings = {}): Readings =>
  buildReadings({
    ...numbered('depth_cm', GOLDEN_DEPTHS_CM),
    depth_mean_written_cm: 15.1,
    ...numbered('width_m', GOLDEN_WIDTHS_M),
    width_mean_written_m: 0.905,
    ...changes,
  })

/** What registers and plan know of the golden run. */
export const buildFacts = (changes: Facts = {}): Facts => ({ ...FACTS, ...changes })

/** What the rules are told of the sheet: the cells of layout `tillage` 1, with changes. */
export function buildOptions({ cells, ...changes }: CheckOptions = {}): CheckOptions {
  const tillage = checkOptions(tillage1)
  return { ...tillage, ...changes, cells: { ...tillage.cells, ...cells } }
}

/**
 * Every reading the method knows, by its key: a printed sheet has room for some of them. `_k` of a repeated reading is
 * written `[1]`, `[2]` … behind the stem. A number stands in the unit named here unless a unit tick beside it says otherwise.
 */
import { OPERATIONS } from './facts.ts'

export interface ReadingKey {
  /** code: a number of a register, or its text. */
  kind: 'number' | 'text' | 'code' | 'tick' | 'date' | 'time' | 'choice'
  unit?: string
  options?: readonly string[]
  /** 'or one': a total may stand without a number. */
  repeats?: true | 'or one'
}

const number = (unit?: string): ReadingKey => ({ kind: 'number', ...(unit ? { unit } : {}) })
const choice = (...options: string[]): ReadingKey => ({ kind: 'choice', options })
const many = (key: ReadingKey): ReadingKey => ({ ...key, repeats: true })
const each = (kind: ReadingKey['kind'], ...keys: string[]) => Object.fromEntries(keys.map((key) => [key, { kind } as ReadingKey]))
const numbers = (unit: string, ...keys: string[]) => Object.fromEntries(keys.map((key) => [key, number(unit)]))

const HEAD: Record<string, ReadingKey> = {
  ...each('text', 'sheet_code', 'village', 'block', 'district', 'state', 'farmer_name', 'farmer_phone', 'operator_name'),
  ...each('text', 'tractor_model', 'tractor_serial', 'implement_type', 'prev_crop', 'residue', 'sky', 'moisture_feel'),
  ...each('text', 'tyre_size_front', 'tyre_size_rear'),
  ...each('code', 'demonstrator_id', 'dealer_id', 'jar_id', 'jug_id', 'tape_id', 'gauge_id', 'gear', 'rain_48h'),
  trial_date: { kind: 'date' },
  gps_lat: number('°'),
  gps_lon: number('°'),
  consent_trial: choice('yes', 'no'),
  consent_photo: choice('yes', 'no'),
  consent_contact: choice('yes', 'no'),
  ...numbers('kW', 'rated_power_kw', 'pto_power_kw'),
  rated_power_unit: choice('kW', 'hp', 'metric_hp'),
  drive: choice('2WD', '4WD'),
  gear_range: choice('L', 'M', 'H'),
  rated_rpm: number('r/min'),
  ...numbers('h', 'hour_meter_start', 'hour_meter_end'),
  operation: choice(...OPERATIONS),
  rated_width_m: number('m'),
  tool_count: number(),
  soil_class: { kind: 'text' },
  moist_can_g: many(number('g')),
  moist_wet_g: many(number('g')),
  moist_dry_g: many(number('g')),
  moist_written_pct: many(number('%')),
  cone_index_kpa: many(number('kPa')),
  slope_pct: number('%'),
  air_temp_c: number('°C'),
  wind_bft: number(),
}

const KIT: Record<string, ReadingKey> = {
  ...each('tick', 'supply_in_jar', 'tank_cock_shut', 'pump_return_in_jar', 'leakoff_return_in_jar', 'vent_open', 'air_bled'),
  ...each('tick', 'leak_check_ok', 'jar_upright_secure', 'clear_of_exhaust', 'jar_level_settled', 'pto_guard_ok'),
  ...each('tick', 'rops_belt_ok', 'extinguisher_near', 'audience_briefed'),
  warmup_min: number('min'),
  bystander_line_m: number('m'),
  fuel_method: choice('D', 'L', 'W'),
  ...numbers('kPa', 'tyre_p_fl', 'tyre_p_fr', 'tyre_p_rl', 'tyre_p_rr'),
  tyre_p_unit: choice('kPa', 'bar', 'psi', 'kgf/cm2'),
  ...numbers('kg', 'ballast_front_kg', 'ballast_rear_kg'),
  water_ballast_pct: number('%'),
}

const PLOT: Record<string, ReadingKey> = {
  plot_shape: choice('R', 'Q', 'P', 'S'),
  ...numbers('m', 'side_ab_m', 'side_bc_m', 'side_cd_m', 'side_da_m', 'diag_ac_m', 'diag_bd_m', 'pass_length_m'),
  tri_a: many(number('m')),
  tri_b: many(number('m')),
  tri_c: many(number('m')),
  deduct_m2: number('m²'),
  area_written: number(),
  area_unit: { kind: 'text' },
  pass_count: number(),
  width_m: many(number('m')),
  depth_cm: many(number('cm')),
}

const WORK: Record<string, ReadingKey> = {
  ...each('time', 't_start', 't_end'),
  turn_count: number(),
  turn_time_s: { kind: 'number', unit: 's', repeats: 'or one' },
  stop_from: many({ kind: 'time' }),
  stop_to: many({ kind: 'time' }),
  stop_reason: many(choice('topup', 'clog', 'adjust', 'breakdown', 'speech', 'travel', 'other')),
  stop_engine: many(choice('on', 'off')),
  stop_engine_off: many({ kind: 'tick' }),
  speed_dist_m: number('m'),
  speed_t_s: many(number('s')),
  ...numbers('r/min', 'rpm_noload', 'rpm_load', 'pto_rpm'),
  rev_n: number(),
  dist_load_m: many(number('m')),
  dist_noload_m: many(number('m')),
  slip_dist_m: number('m'),
  rev_load: number(),
  rev_noload: number(),
  ...numbers('s', 'slip_t_load_s', 'slip_t_noload_s'),
  draft_kn: number('kN'),
  pto_torque_nm: number('N·m'),
  distance_km: number('km'),
  ...numbers('kg', 'load_kg'),
  load_t: number('t'),
  trip_count: number(),
}

const FUEL: Record<string, ReadingKey> = {
  ...numbers('mL', 'jar_start_ml', 'jar_end_ml', 'fuel_used_written_ml'),
  topup_ml: many(number('mL')),
  jar_before_ml: many(number('mL')),
  jar_after_ml: many(number('mL')),
  ...each('time', 'jar_start_t', 'jar_end_t'),
  topup_t: many({ kind: 'time' }),
  ...numbers('°C', 'fuel_temp_start_c', 'fuel_temp_end_c', 'density_temp_c'),
  topup_temp_c: many(number('°C')),
  ...numbers('g', 'jar_start_g', 'jar_end_g'),
  topup_g: many(number('g')),
  ...numbers('kg/m³', 'density_obs', 'density_15'),
  fuel_price: number('per L'),
}

const CLOSING: Record<string, ReadingKey> = {
  l_per_h_written: number('L/h'),
  l_per_ha_written: number('L/ha'),
  l_per_acre_written: number('L/acre'),
  depth_mean_written_cm: number('cm'),
  width_mean_written_m: number('m'),
  speed_written_kmh: number('km/h'),
  slip_written_pct: number('%'),
  efc_written: number('ha/h'),
  ...each('number', 'tilth_score', 'audience_count', 'photo_count'),
  ...each('text', 'clods', 'inversion', 'farmer_opinion', 'remarks', 'circuit_restored_by'),
  ...each('tick', 'sign_demonstrator', 'sign_operator', 'sign_farmer', 'sign_witness'),
  ...each('time', 'circuit_restored_at', 'closed_at'),
}

export const READING_KEYS: Readonly<Record<string, ReadingKey>> = { ...HEAD, ...KIT, ...PLOT, ...WORK, ...FUEL, ...CLOSING }

/** Other words for a key: a rectangle's length and breadth are its sides A–B and B–C. */
export const KEY_ALIASES: Readonly<Record<string, string>> = { plot_length_m: 'side_ab_m', plot_width_m: 'side_bc_m' }

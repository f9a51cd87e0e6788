/**
 * What the rules know of a cell when no layout is handed in: its words, its last written place, whether it may stay blank,
 * and where its values may lie (hard: outside is impossible; plausible: outside is unlikely). Limits as in the table of
 * readings; those a rule of its own looks after are left to it.
 */
export interface CellInfo {
  label: string
  unit?: string
  decimals?: number
  mandatory?: boolean
  hard?: readonly [number, number]
  plausible?: readonly [number, number]
}

const cell = (label: string, info: Omit<CellInfo, 'label'> = {}): CellInfo => ({ label, ...info })
const must = { mandatory: true }

/** By key; a repeated cell by its stem. */
export const CELLS: Readonly<Record<string, CellInfo>> = {
  trial_date: cell('Date', must),
  place_id: cell('Place number', must),
  demonstrator_id: cell('Demonstrator number', must),
  tractor_id: cell('Tractor number', must),
  implement_id: cell('Implement number', must),
  kit_id: cell('Kit number', must),
  supply_in_jar: cell('Supply line in jar', must),
  tank_cock_shut: cell('Tank cock shut', must),
  pump_return_in_jar: cell('Pump return in jar', must),
  leakoff_return_in_jar: cell('Leak-off return in jar', must),
  vent_open: cell('Jar vent open', must),
  air_bled: cell('Air bled', must),
  leak_check_ok: cell('Leak check', must),
  jar_upright_secure: cell('Jar upright and tied', must),
  clear_of_exhaust: cell('Clear of exhaust', must),
  jar_level_settled: cell('Jar level still', must),
  pto_guard_ok: cell('PTO guards on', must),
  rops_belt_ok: cell('Frame up, belt worn', must),
  extinguisher_near: cell('Extinguisher near', must),
  audience_briefed: cell('Audience briefed', must),
  fuel_method: cell('Way of measuring fuel', must),
  gear_range: cell('Gear range', must),
  gear: cell('Gear', { mandatory: true, hard: [1, 9] }),
  hour_meter_start: cell('Hour meter, start', { unit: 'h', decimals: 1, mandatory: true, hard: [0, 99_999.9] }),
  hour_meter_end: cell('Hour meter, end', { unit: 'h', decimals: 1, mandatory: true, hard: [0, 99_999.9] }),
  warmup_min: cell('Warm-up', { unit: 'min', mandatory: true, plausible: [10, 60] }),
  bystander_line_m: cell('Line of the audience', { unit: 'm', mandatory: true, plausible: [20, 999] }),
  tyre_p_fl: cell('Tyre front left', must),
  tyre_p_fr: cell('Tyre front right', must),
  tyre_p_rl: cell('Tyre rear left', must),
  tyre_p_rr: cell('Tyre rear right', must),
  tyre_p_unit: cell('Unit of the tyre pressures'),
  jar_start_t: cell('Jar, start: clock', must),
  jar_end_t: cell('Jar, end: clock', must),
  topup_t: cell('Top-up: clock'),
  fuel_temp_start_c: cell('Fuel temperature, start', { unit: '°C', hard: [-5, 80], plausible: [15, 60] }),
  fuel_temp_end_c: cell('Fuel temperature, end', { unit: '°C', hard: [-5, 80], plausible: [15, 60] }),
  topup_temp_c: cell('Top-up temperature', { unit: '°C', hard: [-5, 80], plausible: [15, 60] }),
  jar_start_ml: cell('Jar, start', { unit: 'mL', mandatory: true }),
  jar_end_ml: cell('Jar, end', { unit: 'mL', mandatory: true }),
  topup_ml: cell('Top-up', { unit: 'mL' }),
  fuel_used_written_ml: cell('Fuel by hand', { unit: 'mL', decimals: 0, mandatory: true }),
  l_per_ha_written: cell('L/ha by hand', { unit: 'L/ha', decimals: 2, mandatory: true }),
  l_per_acre_written: cell('L/acre by hand', { unit: 'L/acre', decimals: 2 }),
  l_per_h_written: cell('L/h by hand', { unit: 'L/h', decimals: 2 }),
  speed_written_kmh: cell('Speed by hand', { unit: 'km/h', decimals: 1 }),
  efc_written: cell('Field capacity by hand', { unit: 'ha/h', decimals: 2 }),
  slip_written_pct: cell('Slip by hand', { unit: '%', decimals: 1 }),
  t_start: cell('Start', must),
  t_end: cell('End', must),
  stop_from: cell('Stop, from'),
  stop_to: cell('Stop, to'),
  stop_engine_off: cell('Stop, engine off'),
  pass_count: cell('Passes', { decimals: 0, mandatory: true, hard: [1, 999] }),
  pass_length_m: cell('Pass length', { unit: 'm', hard: [2, 2000], plausible: [20, 300] }),
  side_ab_m: cell('Side A–B', { unit: 'm', decimals: 1, mandatory: true, hard: [2, 2000], plausible: [20, 300] }),
  side_bc_m: cell('Side B–C', { unit: 'm', decimals: 1, mandatory: true, hard: [2, 2000], plausible: [20, 300] }),
  side_cd_m: cell('Side C–D', { unit: 'm', decimals: 1, hard: [2, 2000], plausible: [20, 300] }),
  side_da_m: cell('Side D–A', { unit: 'm', decimals: 1, hard: [2, 2000], plausible: [20, 300] }),
  diag_ac_m: cell('Diagonal A–C', { unit: 'm', decimals: 1, hard: [2, 2900] }),
  diag_bd_m: cell('Diagonal B–D', { unit: 'm', decimals: 1, hard: [2, 2900] }),
  area_written: cell('Area by hand', { decimals: 3, mandatory: true }),
  area_unit: cell('Unit of the area'),
  depth_cm: cell('Depth', { unit: 'cm', decimals: 1, mandatory: true, hard: [0.5, 80] }),
  depth_mean_written_cm: cell('Mean depth by hand', { unit: 'cm', decimals: 1, mandatory: true }),
  width_m: cell('Width', { unit: 'm', decimals: 2, mandatory: true, hard: [0.2, 12] }),
  width_mean_written_m: cell('Mean width by hand', { unit: 'm', decimals: 3, mandatory: true }),
  rpm_noload: cell('Engine speed, no load', { unit: 'r/min', mandatory: true, hard: [400, 3500] }),
  rpm_load: cell('Engine speed, in work', { unit: 'r/min', mandatory: true, hard: [400, 3500] }),
  pto_rpm: cell('PTO speed', { unit: 'r/min', hard: [100, 1200] }),
  speed_dist_m: cell('Timed distance', { unit: 'm', mandatory: true, hard: [5, 200] }),
  speed_t_s: cell('Time', { unit: 's', mandatory: true, hard: [1, 600] }),
  rev_n: cell('Wheel turns', { hard: [3, 50] }),
  dist_load_m: cell('Way in work', { unit: 'm', hard: [0.5, 999] }),
  dist_noload_m: cell('Way, no load', { unit: 'm', hard: [0.5, 999] }),
  soil_class: cell('Soil', must),
  consent_trial: cell('Consent to the trial'),
  consent_photo: cell('Consent to photos'),
  consent_contact: cell('Consent to a call'),
  circuit_restored_at: cell('Fuel circuit restored at', must),
  sign_demonstrator: cell('Signature of the demonstrator'),
  sign_operator: cell('Signature of the operator'),
  sign_farmer: cell('Signature of the farmer'),
  density_15: cell('Density at 15 °C', { unit: 'kg/m³' }),
}

/** `depth_cm[3]` → stem `depth_cm`, number 3. */
export function stemOf(key: string): { stem: string; n: number | null } {
  const found = /^(.+)\[(\d+)\]$/.exec(key)
  return found ? { stem: found[1] ?? key, n: Number(found[2]) } : { stem: key, n: null }
}

/** Words for a cell: "Depth 3". */
export function labelOf(key: string): string {
  const { stem, n } = stemOf(key)
  const label = CELLS[stem]?.label ?? stem.replaceAll('_', ' ')
  return n === null ? label : label.includes(':') || label.includes(',') ? label.replace(/([:,])/, ` ${n}$1`) : `${label} ${n}`
}

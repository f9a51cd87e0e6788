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
  /** These words go before the layout's: what a sheet prints under a head ("in work") says too little in a sentence. */
  told?: true
}

const cell = (label: string, info: Omit<CellInfo, 'label'> = {}): CellInfo => ({ label, ...info })
const must = { mandatory: true }
const told = { told: true as const }

/** By key; a repeated cell by its stem. */
export const CELLS: Readonly<Record<string, CellInfo>> = {
  trial_date: cell('Date', must),
  place_id: cell('Place number', { ...must, ...told }),
  demonstrator_id: cell('Demonstrator number', { ...must, ...told }),
  tractor_id: cell('Tractor number', { ...must, ...told }),
  implement_id: cell('Implement number', { ...must, ...told }),
  kit_id: cell('Kit number', { ...must, ...told }),
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
  fuel_method: cell('Way of measuring fuel', { ...must, ...told }),
  gear_range: cell('Gear range', { ...must, ...told }),
  gear: cell('Gear', { mandatory: true, hard: [1, 9] }),
  hour_meter_start: cell('Hour meter, start', { unit: 'h', decimals: 1, mandatory: true, hard: [0, 99_999.9] }),
  hour_meter_end: cell('Hour meter, end', { unit: 'h', decimals: 1, mandatory: true, hard: [0, 99_999.9] }),
  warmup_min: cell('Warm-up', { unit: 'min', mandatory: true, plausible: [10, 60] }),
  bystander_line_m: cell('Line of the audience', { unit: 'm', mandatory: true, plausible: [20, 999], ...told }),
  tyre_p_fl: cell('Front left tyre', { ...must, ...told }),
  tyre_p_fr: cell('Front right tyre', { ...must, ...told }),
  tyre_p_rl: cell('Rear left tyre', { ...must, ...told }),
  tyre_p_rr: cell('Rear right tyre', { ...must, ...told }),
  tyre_p_unit: cell('Unit of the tyre pressures', told),
  jar_start_t: cell('Clock of the first jar reading', { ...must, ...told }),
  jar_end_t: cell('Clock of the last jar reading', { ...must, ...told }),
  topup_t: cell('Top-up, clock', told),
  fuel_temp_start_c: cell('Fuel temperature, start', { unit: '°C', hard: [-5, 80], plausible: [15, 60] }),
  fuel_temp_end_c: cell('Fuel temperature, end', { unit: '°C', hard: [-5, 80], plausible: [15, 60] }),
  topup_temp_c: cell('Top-up temperature', { unit: '°C', hard: [-5, 80], plausible: [15, 60] }),
  jar_start_ml: cell('Jar, start', { unit: 'mL', mandatory: true }),
  jar_end_ml: cell('Jar, end', { unit: 'mL', mandatory: true }),
  topup_ml: cell('Top-up', { unit: 'mL' }),
  fuel_used_written_ml: cell('Fuel by hand', { unit: 'mL', decimals: 0, mandatory: true, ...told }),
  l_per_ha_written: cell('Litres per hectare by hand', { unit: 'L/ha', decimals: 2, mandatory: true, ...told }),
  l_per_acre_written: cell('Litres per acre by hand', { unit: 'L/acre', decimals: 2 }),
  l_per_h_written: cell('Litres per hour by hand', { unit: 'L/h', decimals: 2 }),
  speed_written_kmh: cell('Speed by hand', { unit: 'km/h', decimals: 1 }),
  efc_written: cell('Field capacity by hand', { unit: 'ha/h', decimals: 2 }),
  slip_written_pct: cell('Slip by hand', { unit: '%', decimals: 1 }),
  t_start: cell('Start of the run', { ...must, ...told }),
  t_end: cell('End of the run', { ...must, ...told }),
  stop_from: cell('Stop, from'),
  stop_to: cell('Stop, to'),
  stop_engine_off: cell('Stop, engine off'),
  pass_count: cell('Passes', { decimals: 0, mandatory: true, hard: [1, 999] }),
  pass_length_m: cell('Pass length', { unit: 'm', hard: [2, 2000], plausible: [20, 300] }),
  side_ab_m: cell('Side A–B', { unit: 'm', decimals: 1, mandatory: true, hard: [2, 2000], plausible: [20, 300], ...told }),
  side_bc_m: cell('Side B–C', { unit: 'm', decimals: 1, mandatory: true, hard: [2, 2000], plausible: [20, 300], ...told }),
  side_cd_m: cell('Side C–D', { unit: 'm', decimals: 1, hard: [2, 2000], plausible: [20, 300], ...told }),
  side_da_m: cell('Side D–A', { unit: 'm', decimals: 1, hard: [2, 2000], plausible: [20, 300], ...told }),
  diag_ac_m: cell('Diagonal A–C', { unit: 'm', decimals: 1, hard: [2, 2900], ...told }),
  diag_bd_m: cell('Diagonal B–D', { unit: 'm', decimals: 1, hard: [2, 2900], ...told }),
  area_written: cell('Area by hand', { decimals: 3, mandatory: true, ...told }),
  area_unit: cell('Unit of the area', told),
  depth_cm: cell('Depth', { unit: 'cm', decimals: 1, mandatory: true, hard: [0.5, 80] }),
  depth_mean_written_cm: cell('Mean depth by hand', { unit: 'cm', decimals: 1, mandatory: true, ...told }),
  width_m: cell('Width', { unit: 'm', decimals: 2, mandatory: true, hard: [0.2, 12] }),
  width_mean_written_m: cell('Mean width by hand', { unit: 'm', decimals: 3, mandatory: true, ...told }),
  rpm_noload: cell('Engine speed without load', { unit: 'r/min', mandatory: true, hard: [400, 3500], ...told }),
  rpm_load: cell('Engine speed in work', { unit: 'r/min', mandatory: true, hard: [400, 3500], ...told }),
  pto_rpm: cell('PTO speed', { unit: 'r/min', hard: [100, 1200] }),
  speed_dist_m: cell('Timed distance', { unit: 'm', mandatory: true, hard: [5, 200], ...told }),
  speed_t_s: cell('Timed run', { unit: 's', mandatory: true, hard: [1, 600], ...told }),
  rev_n: cell('Wheel turns', { hard: [3, 50], ...told }),
  dist_load_m: cell('Way in work', { unit: 'm', hard: [0.5, 999], ...told }),
  dist_noload_m: cell('Way, no load', { unit: 'm', hard: [0.5, 999], ...told }),
  soil_class: cell('Soil', must),
  consent_trial: cell('Consent to the trial', told),
  consent_photo: cell('Consent to photos', told),
  consent_contact: cell('Consent to a call', told),
  circuit_restored_at: cell('Time the fuel circuit was restored', { ...must, ...told }),
  sign_demonstrator: cell('Signature of the demonstrator', told),
  sign_operator: cell('Signature of the operator', told),
  sign_farmer: cell('Signature of the farmer', told),
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

/**
 * The cells of the tillage sheet, version 1. Limits are those of the readings table (hard: impossible outside; plausible: unlikely
 * outside).
 */
import { area, type CombOptions, choice, comb, conditional, numbered, optional, tick, time } from './cell-builders.ts'
import type { ChoiceCell, LayoutCell, Need } from './layout.ts'

const head: LayoutCell[] = [
  comb(0, 'date')('trial_date', 'date', 32, 18.6, '99-99-9999', { planned: true }),
  comb(0)('demonstrator_id', 'demonstrator no.', 86, 18.6, '9999', {
    said: 'demonstrator number',
    planned: true,
    register: 'people',
  }),
  comb(0)('place_id', 'place no.', 115, 18.6, '9999', { said: 'place number', planned: true, register: 'places' }),
  comb(0)('tractor_id', 'tractor no.', 144, 18.6, '9999', { said: 'tractor number', planned: true, register: 'tractors' }),
  comb(0)('implement_id', 'implement no.', 16.6, 31, '9999', { said: 'implement number', planned: true, register: 'implements' }),
  comb(0)('kit_id', 'kit no.', 45.6, 31, '9999', { said: 'kit number', planned: true, register: 'kits' }),
]

const checkColumns = [14, 60, 104, 150] as const
const CHECKS: Array<[string, string]> = [
  ['supply_in_jar', 'supply line in jar, before pump'],
  ['tank_cock_shut', 'tank cock shut'],
  ['pump_return_in_jar', 'pump return in jar'],
  ['leakoff_return_in_jar', 'leak-off return in jar'],
  ['vent_open', 'jar vent open'],
  ['air_bled', 'air bled'],
  ['leak_check_ok', 'ran 2 min, no drips'],
  ['jar_upright_secure', 'jar upright, tied fast'],
  ['clear_of_exhaust', 'hoses clear of exhaust and fan'],
  ['jar_level_settled', 'level still, no bubbles'],
  ['pto_guard_ok', 'PTO guards on'],
  ['rops_belt_ok', 'frame up, belt worn'],
  ['extinguisher_near', 'fuel-fire extinguisher near'],
  ['audience_briefed', 'audience briefed, line marked'],
]
const before: LayoutCell[] = [
  ...CHECKS.map(([key, label], i) => tick(1, key, label, checkColumns[i % 4]!, 45.9 + 5.1 * Math.floor(i / 4))),
  choice(1, 'fuel_method', 'fuel measured by', 'way of measuring fuel', 'mandatory', 'none', 61.2, [
    ['D', 'difference', 118],
    ['L', 'same line', 144],
    ['W', 'weighing', 168],
  ]),
]

const TYRE_SCALE = { by: 'tyre_p_unit', factors: { psi: 1, kPa: 1, bar: 0.01, 'kgf/cm2': 0.01 } }
const tyre = (key: string, label: string, said: string, x: number) =>
  comb(2)(key, label, x, 87.2, '999', { said, unit: null, scale: TYRE_SCALE, instrument: 'tyre gauge' })
const tractor: LayoutCell[] = [
  comb(2)('hour_meter_start', 'hour meter, start', 16.6, 75.6, '99999.9', {
    unit: 'h',
    hard: [0, 99999.9],
    instrument: 'hour meter',
  }),
  comb(2)('hour_meter_end', 'hour meter, end', 59.6, 75.6, '99999.9', {
    unit: 'h',
    hard: [0, 99999.9],
    instrument: 'hour meter',
  }),
  choice(2, 'gear_range', 'range', 'gear range', 'mandatory', 'above', 77.05, [
    ['L', 'L', 103],
    ['M', 'M', 112],
    ['H', 'H', 121],
  ]),
  comb(2)('gear', 'gear', 132.6, 75.6, '9', { hard: [1, 9] }),
  comb(2)('warmup_min', 'warm-up', 147.6, 75.6, '99', { unit: 'min', hard: [0, 99], plausible: [10, 60], instrument: 'watch' }),
  comb(2)('bystander_line_m', 'crowd line', 168.6, 75.6, '99', {
    said: 'line of the audience',
    unit: 'm',
    hard: [0, 99],
    plausible: [20, 99],
    instrument: 'tape',
  }),
  tyre('tyre_p_fl', 'tyre front left', 'front left tyre', 16.6),
  tyre('tyre_p_fr', 'front right', 'front right tyre', 42.6),
  tyre('tyre_p_rl', 'rear left', 'rear left tyre', 68.6),
  tyre('tyre_p_rr', 'rear right', 'rear right tyre', 94.6),
  choice(2, 'tyre_p_unit', 'pressures in', 'unit of the tyre pressures', 'mandatory', 'above', 88.65, [
    ['psi', 'psi', 122],
    ['kPa', 'kPa', 137],
    ['bar', 'bar', 152],
    ['kgf/cm2', 'kgf/cm²', 167],
  ]),
]

const FUEL_ROWS = [105.4, 113.8, 122.2, 130.6, 139] as const
const levelOptions = { unit: 'mL', hard: [0, 9999] as const, instrument: 'jar' }
const fuelRow = (
  row: number,
  names: { t: string; temp: string; ml: string },
  label: string,
  clock: string,
  need: Need,
  instrument: string,
): LayoutCell[] => [
  time(3)(names.t, `${label}: clock`, 42.6, FUEL_ROWS[row]!, '99:99', {
    said: clock,
    need,
    labelShown: false,
    instrument: 'watch',
  }),
  comb(3)(names.temp, `${label}: fuel temperature`, 73.6, FUEL_ROWS[row]!, '99', {
    unit: '°C',
    need: 'optional',
    labelShown: false,
    hard: [-5, 80],
    plausible: [15, 60],
    instrument: 'thermometer',
  }),
  comb(3)(names.ml, label, 91.6, FUEL_ROWS[row]!, '9999', { ...levelOptions, need, labelShown: false, instrument }),
]
const fuel: LayoutCell[] = [
  ...fuelRow(
    0,
    { t: 'jar_start_t', temp: 'fuel_temp_start_c', ml: 'jar_start_ml' },
    'jar, start',
    'clock of the first jar reading',
    'mandatory',
    'jar',
  ),
  ...numbered(3, (n) =>
    fuelRow(
      n,
      { t: `topup_t[${n}]`, temp: `topup_temp_c[${n}]`, ml: `topup_ml[${n}]` },
      `top-up ${n}`,
      `top-up ${n}, clock`,
      'conditional',
      'jug',
    ),
  ).flat(),
  ...fuelRow(
    4,
    { t: 'jar_end_t', temp: 'fuel_temp_end_c', ml: 'jar_end_ml' },
    'jar, end',
    'clock of the last jar reading',
    'mandatory',
    'jar',
  ),
  comb(3)('fuel_used_written_ml', 'fuel used, by hand', 91.6, 148.8, '9999', {
    said: 'fuel by hand',
    unit: 'mL',
    labelShown: false,
    hard: [0, 9999],
  }),
  time(3)('t_start', 'run, start', 128.6, FUEL_ROWS[0], '99:99', { said: 'start of the run', instrument: 'watch' }),
  time(3)('t_end', 'run, end', 160.6, FUEL_ROWS[0], '99:99', { said: 'end of the run', instrument: 'watch' }),
  ...numbered(3, (n, i) => [
    time(3)(`stop_from[${n}]`, `stop ${n}, from`, 128.6, FUEL_ROWS[i + 2]! - 2.4, '99:99', {
      ...conditional,
      labelShown: false,
      instrument: 'watch',
    }),
    time(3)(`stop_to[${n}]`, `stop ${n}, to`, 160.6, FUEL_ROWS[i + 2]! - 2.4, '99:99', {
      ...conditional,
      labelShown: false,
      instrument: 'watch',
    }),
    tick(3, `stop_engine_off[${n}]`, `stop ${n}, engine off`, 189.4, FUEL_ROWS[i + 2]! - 0.95, 'conditional', false),
  ]).flat(),
  comb(3)('pass_count', 'passes', 128.6, 148.8, '999', { hard: [1, 999] }),
  comb(3)('l_per_ha_written', 'litres per hectare, by hand', 160.6, 148.8, '99.99', {
    said: 'litres per hectare by hand',
    unit: 'L/ha',
    hard: [0, 99.99],
  }),
]

const side = (key: string, label: string, x: number, y: number, options: CombOptions = {}) =>
  comb(4)(key, label, x, y, '999.9', { unit: 'm', hard: [2, 2000], plausible: [20, 300], instrument: '30 m tape', ...options })
const plot: LayoutCell[] = [
  side('side_ab_m', 'side A–B', 50.6, 167.4),
  side('side_bc_m', 'B–C', 84.6, 167.4, { said: 'side B–C' }),
  side('side_cd_m', 'C–D', 118.6, 167.4, { said: 'side C–D', ...conditional }),
  side('side_da_m', 'D–A', 152.6, 167.4, { said: 'side D–A', ...conditional }),
  side('diag_ac_m', 'diagonal A–C', 50.6, 179.2, conditional),
  side('diag_bd_m', 'diagonal B–D', 84.6, 179.2, optional),
  comb(4)('area_written', 'area, by hand', 118.6, 179.2, '99.999', { said: 'area by hand', unit: null, hard: [0, 99.999] }),
  choice(4, 'area_unit', 'area in', 'unit of the area', 'mandatory', 'above', 180.65, [
    ['ha', 'ha', 155],
    ['acre', 'acre', 170],
  ]),
]

const FIVE = [16.6, 40.6, 64.6, 88.6, 112.6] as const
const work: LayoutCell[] = [
  ...numbered(10, (n, i) =>
    comb(5)(`depth_cm[${n}]`, `depth ${n}`, FIVE[i % 5]!, i < 5 ? 196.8 : 208, '99.9', {
      unit: 'cm',
      hard: [0.5, 80],
      plausible: [5, 60],
      instrument: 'steel rule',
    }),
  ),
  ...numbered(5, (n, i) =>
    comb(5)(`width_m[${n}]`, `width ${n}`, FIVE[i]!, 219.2, '9.99', {
      unit: 'm',
      hard: [0.2, 12],
      plausible: [0.5, 9.99],
      instrument: '5 m tape',
    }),
  ),
  comb(5)('rpm_noload', 'engine, no load', 142.6, 196.8, '9999', {
    said: 'engine speed without load',
    unit: 'r/min',
    hard: [400, 3500],
    plausible: [1000, 2700],
    instrument: 'tachometer',
  }),
  comb(5)('rpm_load', 'in work', 172.4, 196.8, '9999', {
    said: 'engine speed in work',
    unit: 'r/min',
    hard: [400, 3500],
    plausible: [1000, 2700],
    instrument: 'tachometer',
  }),
  comb(5)('depth_mean_written_cm', 'mean depth, by hand', 142.6, 208, '99.9', {
    said: 'mean depth by hand',
    unit: 'cm',
    hard: [0.5, 80],
  }),
  comb(5)('width_mean_written_m', 'mean width, by hand', 142.6, 219.2, '9.999', {
    said: 'mean width by hand',
    unit: 'm',
    hard: [0.2, 12],
  }),
]

const pegs = { unit: 'm', instrument: '30 m tape' }
const slip: LayoutCell[] = [
  comb(6)('speed_dist_m', 'between pegs', 16.6, 236.4, '99.9', {
    said: 'timed distance',
    ...pegs,
    hard: [5, 200],
    plausible: [10, 50],
  }),
  ...numbered(3, (n, i) =>
    comb(6)(`speed_t_s[${n}]`, `time ${n}`, 42.6 + 32 * i, 236.4, '999.9', {
      said: `timed run ${n}`,
      unit: 's',
      hard: [1, 600],
      instrument: 'stopwatch',
    }),
  ),
  comb(6)('rev_n', 'wheel turns', 16.6, 247.6, '99', { hard: [3, 50], instrument: 'chalk mark', ...conditional }),
  ...numbered(2, (n, i) =>
    comb(6)(`dist_load_m[${n}]`, `in work ${n}`, 42.6 + 32 * i, 247.6, '99.99', {
      said: `way in work ${n}`,
      ...pegs,
      ...conditional,
      hard: [0.5, 99.99],
    }),
  ),
  ...numbered(2, (n, i) =>
    comb(6)(`dist_noload_m[${n}]`, `no load ${n}`, 110.6 + 32 * i, 247.6, '99.99', {
      said: `way ${n}, no load`,
      ...pegs,
      ...conditional,
      hard: [0.5, 99.99],
    }),
  ),
]

const yesNo = (key: string, label: string, said: string, x: number): ChoiceCell =>
  choice(7, key, label, said, 'mandatory', 'before', 258.6, [
    ['yes', 'y', x],
    ['no', 'n', x + 8.4],
  ])
const close: LayoutCell[] = [
  choice(7, 'soil_class', 'soil', 'soil', 'mandatory', 'before', 258.6, [
    ['fine', 'fine', 42],
    ['medium', 'medium', 56],
    ['coarse', 'coarse', 76],
  ]),
  yesNo('consent_trial', 'trial', 'consent to the trial', 127),
  yesNo('consent_photo', 'photos', 'consent to photos', 155),
  yesNo('consent_contact', 'a call', 'consent to a call', 180),
  time(7)('circuit_restored_at', 'fuel circuit restored', 34.6, 267.2, '99:99', {
    said: 'time the fuel circuit was restored',
    instrument: 'watch',
  }),
  time(7)('closed_at', 'sheet closed', 66.6, 267.2, '99:99', { ...optional, instrument: 'watch' }),
  area('line', 'circuit_restored_by', 'restored by', 96, 267.2, 38, 7.4, 'optional', true),
  area('line', 'remarks', 'remarks', 138, 267.2, 41, 7.4, 'optional'),
  area('signature', 'sign_demonstrator', 'demonstrator', 31, 279, 35, 8, 'mandatory', true, 'signature of the demonstrator'),
  area('signature', 'sign_operator', 'driver', 69, 279, 35, 8, 'mandatory', true, 'signature of the operator'),
  area('signature', 'sign_farmer', 'farmer (or thumb mark)', 107, 279, 35, 8, 'mandatory', true, 'signature of the farmer'),
  area('signature', 'sign_witness', 'witness, dealer', 145, 279, 34, 8, 'optional', true),
]

/** Every cell, in the order of the page. */
export const tillageCells: readonly LayoutCell[] = [...head, ...before, ...tractor, ...fuel, ...plot, ...work, ...slip, ...close]

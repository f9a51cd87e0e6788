/**
 * Cells that stand on every sheet of a run, whatever the work: a layout says how far down the page they begin (`y`, millimetres).
 * Printed layouts are made of them, so nothing here moves: other places, other functions.
 */
import { area, choice, comb, conditional, numbered, optional, tick, time } from './cell-builders.ts'
import type { ChoiceCell, LayoutCell, LayoutRule, LayoutText, Need, TickCell } from './layout.ts'

/** Hundredths of a millimetre, without the crumbs of adding. */
const tidy = (mm: number) => Math.round(mm * 100) / 100

/** Who, where and with what: printed by the plan, or boxes on a blank sheet. */
export const headCells: readonly LayoutCell[] = [
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

/** What must be seen before the jar is read, by key. */
export const JAR_CHECKS: ReadonlyArray<[key: string, label: string]> = [
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
const CHECK_COLUMNS = [14, 60, 104, 150] as const

/** The check list in four columns, a row every 5.1 mm. */
export const checkTicks = (checks: ReadonlyArray<[key: string, label: string]>, y: number): TickCell[] =>
  checks.map(([key, label], i) => tick(1, key, label, CHECK_COLUMNS[i % 4]!, y + 5.1 * Math.floor(i / 4)))

/** How fuel is measured: the right half of the check list's last row. */
export const fuelMethod = (y: number): ChoiceCell =>
  choice(1, 'fuel_method', 'fuel measured by', 'way of measuring fuel', 'mandatory', 'none', y, [
    ['D', 'difference', 118],
    ['L', 'same line', 144],
    ['W', 'weighing', 168],
  ])

const TYRE_SCALE = { by: 'tyre_p_unit', factors: { psi: 1, kPa: 1, bar: 0.01, 'kgf/cm2': 0.01 } }
const hourMeter = (key: string, label: string, x: number, y: number) =>
  comb(2)(key, label, x, y, '99999.9', { unit: 'h', hard: [0, 99999.9], instrument: 'hour meter' })
const tyre = (key: string, label: string, said: string, x: number, y: number) =>
  comb(2)(key, label, x, y, '999', { said, unit: null, scale: TYRE_SCALE, instrument: 'tyre gauge' })

/** Two rows: meter, gear, warm-up and the line of the audience; below them the tyres. */
export const tractorCells = (y: number, tyres_y: number): LayoutCell[] => [
  hourMeter('hour_meter_start', 'hour meter, start', 16.6, y),
  hourMeter('hour_meter_end', 'hour meter, end', 59.6, y),
  choice(2, 'gear_range', 'range', 'gear range', 'mandatory', 'above', y + 1.45, [
    ['L', 'L', 103],
    ['M', 'M', 112],
    ['H', 'H', 121],
  ]),
  comb(2)('gear', 'gear', 132.6, y, '9', { hard: [1, 9] }),
  comb(2)('warmup_min', 'warm-up', 147.6, y, '99', { unit: 'min', hard: [0, 99], plausible: [10, 60], instrument: 'watch' }),
  comb(2)('bystander_line_m', 'crowd line', 168.6, y, '99', {
    said: 'line of the audience',
    unit: 'm',
    hard: [0, 99],
    plausible: [20, 99],
    instrument: 'tape',
  }),
  tyre('tyre_p_fl', 'tyre front left', 'front left tyre', 16.6, tyres_y),
  tyre('tyre_p_fr', 'front right', 'front right tyre', 42.6, tyres_y),
  tyre('tyre_p_rl', 'rear left', 'rear left tyre', 68.6, tyres_y),
  tyre('tyre_p_rr', 'rear right', 'rear right tyre', 94.6, tyres_y),
  choice(2, 'tyre_p_unit', 'pressures in', 'unit of the tyre pressures', 'mandatory', 'above', tyres_y + 1.45, [
    ['psi', 'psi', 122],
    ['kPa', 'kPa', 137],
    ['bar', 'bar', 152],
    ['kgf/cm2', 'kgf/cm²', 167],
  ]),
]

const FUEL_STEP_MM = 8.4
/** The sum stands this far below the first row, under its rule. */
const SUM_AT_MM = 43.4
const fuelRow = (
  y: number,
  names: { t: string; temp: string; ml: string },
  label: string,
  clock: string,
  need: Need,
  instrument: string,
): LayoutCell[] => [
  time(3)(names.t, `${label}: clock`, 42.6, y, '99:99', { said: clock, need, labelShown: false, instrument: 'watch' }),
  comb(3)(names.temp, `${label}: fuel temperature`, 73.6, y, '99', {
    unit: '°C',
    need: 'optional',
    labelShown: false,
    hard: [-5, 80],
    plausible: [15, 60],
    instrument: 'thermometer',
  }),
  comb(3)(names.ml, label, 91.6, y, '9999', { unit: 'mL', hard: [0, 9999], instrument, need, labelShown: false }),
]

/** The jar's balance as a column to be added by hand; `y`: its first row. */
export const fuelCells = (y: number): LayoutCell[] => [
  ...fuelRow(
    y,
    { t: 'jar_start_t', temp: 'fuel_temp_start_c', ml: 'jar_start_ml' },
    'jar, start',
    'clock of the first jar reading',
    'mandatory',
    'jar',
  ),
  ...numbered(3, (n) =>
    fuelRow(
      tidy(y + FUEL_STEP_MM * n),
      { t: `topup_t[${n}]`, temp: `topup_temp_c[${n}]`, ml: `topup_ml[${n}]` },
      `top-up ${n}`,
      `top-up ${n}, clock`,
      'conditional',
      'jug',
    ),
  ).flat(),
  ...fuelRow(
    tidy(y + FUEL_STEP_MM * 4),
    { t: 'jar_end_t', temp: 'fuel_temp_end_c', ml: 'jar_end_ml' },
    'jar, end',
    'clock of the last jar reading',
    'mandatory',
    'jar',
  ),
  comb(3)('fuel_used_written_ml', 'fuel used, by hand', 91.6, tidy(y + SUM_AT_MM), '9999', {
    said: 'fuel by hand',
    unit: 'mL',
    labelShown: false,
    hard: [0, 9999],
  }),
]

/** Start, end and three stops, beside the jar's column. */
export const clockCells = (y: number): LayoutCell[] => [
  time(3)('t_start', 'run, start', 128.6, y, '99:99', { said: 'start of the run', instrument: 'watch' }),
  time(3)('t_end', 'run, end', 160.6, y, '99:99', { said: 'end of the run', instrument: 'watch' }),
  ...numbered(3, (n, i) => {
    const row = tidy(y + FUEL_STEP_MM * (i + 2) - 2.4)
    const written = { ...conditional, labelShown: false as const, instrument: 'watch' }
    return [
      time(3)(`stop_from[${n}]`, `stop ${n}, from`, 128.6, row, '99:99', written),
      time(3)(`stop_to[${n}]`, `stop ${n}, to`, 160.6, row, '99:99', written),
      tick(3, `stop_engine_off[${n}]`, `stop ${n}, engine off`, 189.4, tidy(row + 1.45), 'conditional', false),
    ]
  }).flat(),
]

/** The words of the jar's column and of the stops; `y`: first row, as for the cells. */
export const fuelTexts = (y: number): LayoutText[] => {
  const small = { size: 6.8, tone: 'grey' as const }
  return [
    { x: 42.6, y: tidy(y - 1.3), text: 'hour : min', ...small },
    { x: 73.6, y: tidy(y - 1.3), text: '°C in jar', ...small },
    { x: 114.8, y: tidy(y - 1.3), text: 'mL', size: 7.4, weight: 'bold', align: 'right' },
    { x: 14, y: tidy(y + 4.6), text: 'Jar, start', size: 8.2, weight: 'bold' },
    ...numbered(3, (n) => ({ x: 14, y: tidy(y + 4.6 + FUEL_STEP_MM * n), text: `+  top-up ${n}`, size: 8.2 })),
    { x: 14, y: tidy(y + 38.2), text: '–  Jar, end', size: 8.2, weight: 'bold' },
    { x: 14, y: tidy(y + 46.8), text: '=  Fuel used, by hand', size: 8.2, weight: 'bold' },
    { x: 19, y: tidy(y + 50), text: 'start + top-ups – end', size: 6.6, tone: 'grey' },
    { x: 128.6, y: tidy(y + 13.2), text: 'stop, from', ...small },
    { x: 160.6, y: tidy(y + 13.2), text: 'stop, to', ...small },
    { x: 196, y: tidy(y + 13.2), text: 'engine off', ...small, align: 'right' },
    ...numbered(3, (n) => ({
      x: 122.6,
      y: tidy(y + 10.8 + FUEL_STEP_MM * n),
      text: String(n),
      size: 8.2,
      weight: 'bold' as const,
    })),
  ]
}

/** The sum's single and double rule, and the one between jar and clock. */
export const fuelRules = (y: number): LayoutRule[] => [
  { x1: 91, y1: tidy(y + 41.9), x2: 115.4, y2: tidy(y + 41.9), width: 0.4 },
  { x1: 91, y1: tidy(y + 51.6), x2: 115.4, y2: tidy(y + 51.6), width: 0.25 },
  { x1: 91, y1: tidy(y + 52.2), x2: 115.4, y2: tidy(y + 52.2), width: 0.25 },
  { x1: 119.6, y1: tidy(y - 3.9), x2: 119.6, y2: tidy(y + 51.8), width: 0.15 },
]

const yesNo = (key: string, label: string, said: string, x: number, y: number): ChoiceCell =>
  choice(7, key, label, said, 'mandatory', 'before', y, [
    ['yes', 'y', x],
    ['no', 'n', x + 8.4],
  ])

/** What the farmer agrees to: the right half of a row. */
export const consentCells = (y: number): ChoiceCell[] => [
  yesNo('consent_trial', 'trial', 'consent to the trial', 127, y),
  yesNo('consent_photo', 'photos', 'consent to photos', 155, y),
  yesNo('consent_contact', 'a call', 'consent to a call', 180, y),
]
export const consentText = (y: number): LayoutText => ({
  x: 100,
  y: tidy(y + 3.2),
  text: 'farmer agrees to',
  size: 7.4,
  tone: 'grey',
})

/** When the tractor was put back as it was, between the lower corner codes. */
export const restoredCells = (y: number): LayoutCell[] => [
  time(7)('circuit_restored_at', 'fuel circuit restored', 34.6, y, '99:99', {
    said: 'time the fuel circuit was restored',
    instrument: 'watch',
  }),
  time(7)('closed_at', 'sheet closed', 66.6, y, '99:99', { ...optional, instrument: 'watch' }),
]

export const signatureCells: readonly LayoutCell[] = [
  area('signature', 'sign_demonstrator', 'demonstrator', 31, 279, 35, 8, 'mandatory', true, 'signature of the demonstrator'),
  area('signature', 'sign_operator', 'driver', 69, 279, 35, 8, 'mandatory', true, 'signature of the operator'),
  area('signature', 'sign_farmer', 'farmer (or thumb mark)', 107, 279, 35, 8, 'mandatory', true, 'signature of the farmer'),
  area('signature', 'sign_witness', 'witness, dealer', 145, 279, 34, 8, 'optional', true),
]

/** Corner codes and squares of every sheet so far: where the reader's aids stand. */
export const cornerCodes = [
  { x: 7, y: 7, size: 18 },
  { x: 185, y: 7, size: 18 },
  { x: 185, y: 272, size: 18 },
  { x: 7, y: 272, size: 18 },
] as const
export const edgeSquares = numbered(5, (_, i) => [
  { x: 5.5, y: 57.6 + 44.2 * i, size: 5 },
  { x: 199.5, y: 57.6 + 44.2 * i, size: 5 },
]).flat()

/**
 * The cells of the haulage sheet, version 1: a trailer on the road, or a machine driven by the PTO. No plot. Limits are those of
 * the readings table where it has the reading; the others are common practice.
 */
import { area, choice, comb, conditional, numbered, optional } from './cell-builders.ts'
import {
  checkTicks,
  clockCells,
  consentCells,
  fuelCells,
  fuelMethod,
  headCells,
  JAR_CHECKS,
  restoredCells,
  signatureCells,
  tractorCells,
} from './common-cells.ts'
import type { LayoutCell } from './layout.ts'

const before: LayoutCell[] = [
  ...checkTicks(
    [
      ...JAR_CHECKS,
      ['hitch_locked', 'hitch pin in and locked'],
      ['load_tied', 'load within plate, tied'],
      ['road_fit', 'brakes, lights and plates right'],
      ['driver_licensed', 'driver holds the licence'],
    ],
    45.9,
  ),
  fuelMethod(66.3),
]

export const FUEL_Y = 111.2
const fuel: LayoutCell[] = [
  ...fuelCells(FUEL_Y),
  ...clockCells(FUEL_Y),
  comb(3)('l_per_h_written', 'litres per hour, by hand', 160.6, FUEL_Y + 43.4, '99.99', {
    said: 'litres per hour by hand',
    unit: 'L/h',
    hard: [0, 99.99],
  }),
]

const WORK = [173.4, 185] as const
const kilograms = { unit: 'kg', ...conditional, hard: [1, 99999] as const }
const kilometres = { unit: 'km', ...conditional, hard: [0.1, 99.9] as const, plausible: [0.5, 60] as const }
const work: LayoutCell[] = [
  choice(4, 'work_kind', 'kind of work', 'kind of work', 'mandatory', 'above', WORK[0] + 1.45, [
    ['transport', 'transport', 14],
    ['pto', 'PTO work', 34],
  ]),
  comb(4)('load_kg', 'load of a trip', 62.6, WORK[0], '99999', {
    ...kilograms,
    plausible: [100, 20000],
    instrument: 'weighbridge, or count by mass',
  }),
  comb(4)('trip_count', 'trips', 99.6, WORK[0], '99', { ...conditional, hard: [1, 99], plausible: [1, 30] }),
  comb(4)('distance_km', 'driven', 120.6, WORK[0], '99.9', { ...kilometres, said: 'distance driven', instrument: 'odometer' }),
  comb(4)('distance_loaded_km', 'of it loaded', 148.6, WORK[0], '99.9', {
    ...kilometres,
    said: 'distance driven loaded',
    instrument: 'odometer',
  }),
  comb(4)('slope_pct', 'steepest', 180.6, WORK[0], '99', {
    ...optional,
    said: 'steepest slope',
    unit: '%',
    hard: [0, 40],
    plausible: [0, 8],
    instrument: 'level',
  }),
  choice(4, 'load_by', 'load is', 'way the load is known', 'conditional', 'above', WORK[1] + 1.45, [
    ['weighed', 'weighed', 14],
    ['counted', 'counted', 34],
  ]),
  comb(4)('trailer_kg', 'trailer or machine, empty', 62.6, WORK[1], '99999', {
    ...kilograms,
    said: 'empty mass of the trailer',
    plausible: [200, 10000],
    instrument: 'plate',
  }),
  comb(4)('worked_kg', 'PTO: went through', 99.6, WORK[1], '99999', {
    ...kilograms,
    said: 'mass that went through the machine',
    instrument: 'scale, or count by mass',
  }),
  choice(4, 'road_surface', 'road or ground', 'road or ground', 'mandatory', 'above', WORK[1] + 1.45, [
    ['paved', 'paved', 140],
    ['gravel', 'gravel', 157],
    ['earth', 'earth', 175],
  ]),
]

const ENGINE_Y = 203
const revolutions = { unit: 'r/min', instrument: 'tachometer' }
const engine: LayoutCell[] = [
  comb(5)('rpm_noload', 'engine, no load', 16.6, ENGINE_Y, '9999', {
    ...revolutions,
    said: 'engine speed without load',
    hard: [400, 3500],
    plausible: [1000, 2700],
  }),
  comb(5)('rpm_load', 'in work', 48.6, ENGINE_Y, '9999', {
    ...revolutions,
    said: 'engine speed in work',
    hard: [400, 3500],
    plausible: [1000, 2700],
  }),
  comb(5)('pto_rpm', 'PTO, in work', 80.6, ENGINE_Y, '9999', {
    ...revolutions,
    ...conditional,
    said: 'PTO speed',
    hard: [100, 1200],
    plausible: [480, 1100],
  }),
  choice(5, 'pto_nominal', 'PTO made for', 'PTO speed the machine is made for', 'conditional', 'above', ENGINE_Y + 1.45, [
    ['540', '540', 112],
    ['1000', '1000', 127],
  ]),
  comb(5)('pto_torque_nm', 'PTO torque, if measured', 148.6, ENGINE_Y, '9999', {
    ...optional,
    said: 'PTO torque',
    unit: 'N·m',
    hard: [1, 5000],
    plausible: [50, 1500],
    instrument: 'torque meter',
  }),
]

const PEGS_Y = 221
const speed: LayoutCell[] = [
  comb(6)('speed_dist_m', 'between pegs', 16.6, PEGS_Y, '999.9', {
    ...conditional,
    said: 'timed distance',
    unit: 'm',
    hard: [5, 200],
    plausible: [20, 200],
    instrument: '30 m tape',
  }),
  ...numbered(3, (n, i) =>
    comb(6)(`speed_t_s[${n}]`, `time ${n}`, 48.6 + 32 * i, PEGS_Y, '999.9', {
      ...conditional,
      said: `timed run ${n}`,
      unit: 's',
      hard: [1, 600],
      instrument: 'stopwatch',
    }),
  ),
]

const close: LayoutCell[] = [
  ...consentCells(232.4),
  area('line', 'remarks', 'remarks: road, weather, load, stops, repairs', 14, 243, 182, 17, 'optional', false, 'remarks'),
  ...restoredCells(267.2),
  area('line', 'circuit_restored_by', 'restored by', 98.6, 267.2, 80.4, 7.4, 'optional', true),
  ...signatureCells,
]

/** Every cell, in the order of the page. */
export const haulageCells: readonly LayoutCell[] = [
  ...headCells,
  ...before,
  ...tractorCells(81.2, 92.8),
  ...fuel,
  ...work,
  ...engine,
  ...speed,
  ...close,
]

/**
 * The cells of the tillage sheet, version 1. Limits are those of the readings table (hard: impossible outside; plausible: unlikely
 * outside).
 */
import { area, type CombOptions, choice, comb, conditional, numbered, optional } from './cell-builders.ts'
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

const FUEL_Y = 105.4
const fuel: LayoutCell[] = [
  ...fuelCells(FUEL_Y),
  ...clockCells(FUEL_Y),
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

const close: LayoutCell[] = [
  choice(7, 'soil_class', 'soil', 'soil', 'mandatory', 'before', 258.6, [
    ['fine', 'fine', 42],
    ['medium', 'medium', 56],
    ['coarse', 'coarse', 76],
  ]),
  ...consentCells(258.6),
  ...restoredCells(267.2),
  area('line', 'circuit_restored_by', 'restored by', 96, 267.2, 38, 7.4, 'optional', true),
  area('line', 'remarks', 'remarks', 138, 267.2, 41, 7.4, 'optional'),
  ...signatureCells,
]

/** Every cell, in the order of the page. */
export const tillageCells: readonly LayoutCell[] = [
  ...headCells,
  ...checkTicks(JAR_CHECKS, 45.9),
  fuelMethod(61.2),
  ...tractorCells(75.6, 87.2),
  ...fuel,
  ...plot,
  ...work,
  ...slip,
  ...close,
]

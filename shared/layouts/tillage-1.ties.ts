/**
 * What the tillage sheet, version 1, ties together. Times stand in two chains that share start and end: top-ups and stops need
 * not follow each other.
 */
import { ACRE_M2, HECTARE_M2, type Tie } from './tie.ts'

const numbered = (stem: string, count: number) => Array.from({ length: count }, (_, i) => `${stem}[${i + 1}]`)
const area = { unit: 'area_unit', squareMetres: { ha: HECTARE_M2, acre: ACRE_M2 } } as const
const stops = [1, 2, 3].flatMap((n) => [`stop_from[${n}]`, `stop_to[${n}]`])

export const tillageTies: ReadonlyArray<Tie> = [
  {
    kind: 'balance',
    plus: ['jar_start_ml', ...numbered('topup_ml', 3)],
    minus: ['jar_end_ml'],
    equals: 'fuel_used_written_ml',
  },
  {
    kind: 'area',
    sides: ['side_ab_m', 'side_bc_m', 'side_cd_m', 'side_da_m'],
    diagonal: 'diag_ac_m',
    equals: 'area_written',
    ...area,
  },
  { kind: 'rate', amount: 'fuel_used_written_ml', factor: 0.001, area: 'area_written', equals: 'l_per_ha_written', ...area },
  { kind: 'mean', of: numbered('depth_cm', 10), equals: 'depth_mean_written_cm' },
  { kind: 'mean', of: numbered('width_m', 5), equals: 'width_mean_written_m' },

  { kind: 'order', keys: ['t_start', ...stops, 't_end', 'circuit_restored_at', 'closed_at'], usual_min: 180 },
  { kind: 'order', keys: ['t_start', ...numbered('topup_t', 3), 't_end'], usual_min: 180 },
  // Rule Q01 allows 5 minutes between the jar's clock and the run's.
  { kind: 'near', keys: ['jar_start_t', 't_start'], amount: 5 },
  { kind: 'near', keys: ['t_end', 'jar_end_t'], amount: 5 },
  { kind: 'elapsed', less: 'hour_meter_start', greater: 'hour_meter_end', start: 't_start', end: 't_end' },

  { kind: 'near', keys: ['tyre_p_fl', 'tyre_p_fr'], share: 0.25 },
  { kind: 'near', keys: ['tyre_p_rl', 'tyre_p_rr'], share: 0.25 },
  { kind: 'near', keys: numbered('speed_t_s', 3), share: 0.15 },
  { kind: 'near', keys: numbered('dist_load_m', 2), share: 0.1 },
  { kind: 'near', keys: numbered('dist_noload_m', 2), share: 0.1 },
  { kind: 'near', keys: ['dist_load_m[2]', 'dist_noload_m[1]'], share: 0.35 },
  { kind: 'alike', keys: numbered('depth_cm', 10), share: 0.3 },
  { kind: 'alike', keys: numbered('width_m', 5), share: 0.12 },
  { kind: 'alike', keys: ['side_ab_m', 'side_cd_m'], share: 0.3 },
  { kind: 'alike', keys: ['side_bc_m', 'side_da_m'], share: 0.3 },
  // Rule on passes: passes times width is the breadth to within a tenth.
  { kind: 'quotient', key: 'pass_count', product: 'side_bc_m', by: 'width_mean_written_m', share: 0.1 },
  { kind: 'not-less', greater: 'rpm_noload', less: 'rpm_load', usual: 600 },
  {
    kind: 'near',
    keys: ['fuel_temp_start_c', ...numbered('topup_temp_c', 3), 'fuel_temp_end_c'],
    amount: 25,
  },

  // Jar marked each 200 mL, jug each 100 mL; half a mark may be judged (rules Q06, Q07). Depths are written to half centimetres.
  { kind: 'marks', keys: ['jar_start_ml', 'jar_end_ml'], step: 200, half: 100 },
  { kind: 'marks', keys: numbered('topup_ml', 3), step: 100, half: 50 },
  { kind: 'marks', keys: ['fuel_used_written_ml'], step: 100, half: 50 },
  { kind: 'marks', keys: numbered('depth_cm', 10), step: 0.5 },
  { kind: 'marks', keys: ['rpm_noload', 'rpm_load'], step: 10 },
]

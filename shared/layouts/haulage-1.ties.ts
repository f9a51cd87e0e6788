/** What the haulage sheet, version 1, ties together; as the tillage sheet does where both hold the same readings. */
import type { Tie } from './tie.ts'

const numbered = (stem: string, count: number) => Array.from({ length: count }, (_, i) => `${stem}[${i + 1}]`)
const stops = [1, 2, 3].flatMap((n) => [`stop_from[${n}]`, `stop_to[${n}]`])

export const haulageTies: ReadonlyArray<Tie> = [
  {
    kind: 'balance',
    plus: ['jar_start_ml', ...numbered('topup_ml', 3)],
    minus: ['jar_end_ml'],
    equals: 'fuel_used_written_ml',
  },

  { kind: 'order', keys: ['t_start', ...stops, 't_end', 'circuit_restored_at', 'closed_at'], usual_min: 180 },
  { kind: 'order', keys: ['t_start', ...numbered('topup_t', 3), 't_end'], usual_min: 180 },
  // Rule Q01 allows 5 minutes between the jar's clock and the run's.
  { kind: 'near', keys: ['jar_start_t', 't_start'], amount: 5 },
  { kind: 'near', keys: ['t_end', 'jar_end_t'], amount: 5 },
  { kind: 'elapsed', less: 'hour_meter_start', greater: 'hour_meter_end', start: 't_start', end: 't_end' },

  { kind: 'near', keys: ['tyre_p_fl', 'tyre_p_fr'], share: 0.25 },
  { kind: 'near', keys: ['tyre_p_rl', 'tyre_p_rr'], share: 0.25 },
  { kind: 'near', keys: numbered('speed_t_s', 3), share: 0.15 },
  { kind: 'not-less', greater: 'rpm_noload', less: 'rpm_load', usual: 600 },
  { kind: 'not-less', greater: 'distance_km', less: 'distance_loaded_km' },
  { kind: 'near', keys: ['fuel_temp_start_c', ...numbered('topup_temp_c', 3), 'fuel_temp_end_c'], amount: 25 },

  // Jar marked each 200 mL, jug each 100 mL; half a mark may be judged (rules Q06, Q07). Scales and plates go by tens.
  { kind: 'marks', keys: ['jar_start_ml', 'jar_end_ml'], step: 200, half: 100 },
  { kind: 'marks', keys: numbered('topup_ml', 3), step: 100, half: 50 },
  { kind: 'marks', keys: ['fuel_used_written_ml'], step: 100, half: 50 },
  { kind: 'marks', keys: ['load_kg', 'trailer_kg', 'worked_kg'], step: 10 },
  { kind: 'marks', keys: ['rpm_noload', 'rpm_load', 'pto_rpm'], step: 10 },
]

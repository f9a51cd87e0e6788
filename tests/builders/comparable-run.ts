import type { ComparableRun } from '../../server/db/desk/comparable-runs.ts'
import { SIX_PLOTS } from './known-data.ts'

const uuid = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`
const figure = (value: number, U: number) => ({ value, U, reason: null })

/** A run as the trial book hands it to a comparison: 14 L/ha at 15 cm unless told otherwise. */
export function buildComparableRun(changes: Partial<ComparableRun> = {}): ComparableRun {
  return {
    number: 1,
    state: 'entered',
    trialDate: '2026-09-16',
    gear: 'L3',
    soil: 'medium',
    tractor: { id: uuid(11), number: 11, name: 'Tarnfold 50', ptoPower_kw: 32 },
    implement: { id: uuid(21), number: 21, name: 'plough, 3 bottoms', operation: 'plough' },
    place: { name: 'Kelwadi', district: 'Sannipur' },
    plot: null,
    results: {
      l_per_ha: figure(14, 0.7),
      depth_mean_cm: figure(15, 0.8),
      ml_per_m3: figure(9.3, 0.7),
      l_per_h: figure(4.4, 0.2),
    },
    exclusion: null,
    ...changes,
  }
}

/** Two tractors once each on six plots of one day, with the values whose paired t R computed. */
export const buildSixPlots = (): ComparableRun[] =>
  Object.values(SIX_PLOTS).flatMap((values, t) =>
    values.map((value, i) => {
      const run = buildComparableRun({ number: 41 + 2 * i + t, plot: `K${i + 1}` })
      const tractor = t === 0 ? run.tractor : { id: uuid(14), number: 14, name: 'Ostrel D5', ptoPower_kw: 33 }
      const depth_cm = 15 + ((i + t) % 3) / 10
      const ml_per_m3 = figure((value * 10) / depth_cm, 0.6)
      return {
        ...run,
        tractor,
        results: { ...run.results, l_per_ha: figure(value, 0.6), depth_mean_cm: figure(depth_cm, 0.8), ml_per_m3 },
      }
    }),
  )

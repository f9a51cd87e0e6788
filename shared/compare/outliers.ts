/** Values far from their like within a treatment: shown, never dropped. */
import type { Analysis } from '../schemas/comparison.ts'
import { grubbsCritical, grubbsDistance, robustZ } from '../trial/outliers.ts'
import { ALPHA, byTreatment, type Observation, valuesOf } from './observations.ts'

/** Fewer values do not tell a wild one from a spread. */
const GRUBBS_LEAST = 6
const ROBUST_LEAST = 5
const ROBUST_BEYOND = 3.5

/** Grubbs two-sided (NIST e-Handbook 1.3.5.17.1) for each treatment's farthest value; robust z beyond 3.5, which two wild values do not hide. */
export function outliersOf(observations: readonly Observation[]): Analysis['outliers'] {
  const grubbs: Analysis['outliers']['grubbs'] = []
  const robust: Analysis['outliers']['robust'] = []
  for (const [treatment, group] of byTreatment(observations)) {
    const values = valuesOf(group)
    if (values.length >= GRUBBS_LEAST) {
      const far = group
        .map((o) => ({ ...o, g: grubbsDistance(o.value, values) ?? 0 }))
        .reduce((most, o) => (o.g > most.g ? o : most))
      const critical = grubbsCritical(values.length, ALPHA)
      const { id, value, g } = far
      if (g > 0) grubbs.push({ treatment, id, value, n: values.length, g, critical, beyond: g > critical })
    }
    if (values.length >= ROBUST_LEAST) {
      for (const { id, value } of group) {
        const z = robustZ(value, values)
        if (z !== null && Math.abs(z) > ROBUST_BEYOND) robust.push({ treatment, id, value, z })
      }
    }
  }
  return { alpha: ALPHA, grubbs, robust }
}

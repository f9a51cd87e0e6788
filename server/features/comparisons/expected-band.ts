/** What a run could be expected to burn in an hour, and on what ground. */
import type { ComparedRun } from '../../../shared/schemas/book-comparison.ts'

/** Rules Q29 to Q31: the model is rough by 35 %; full load burns 0.316 L/h a kW of PTO power (D497.7), near idle 0.05 (common practice). */
const MODEL_SHARE = 0.35
const FULL_LOAD = 0.316
const NEAR_IDLE = 0.05

/** By the load model (C19) where draft and speed are known, else between near idle and full load of the tractor's PTO power. */
export function expectedBand(model_l_per_h: number | null, ptoPower_kw: number | null): ComparedRun['expected'] {
  if (model_l_per_h !== null)
    return {
      from: model_l_per_h * (1 - MODEL_SHARE),
      to: model_l_per_h * (1 + MODEL_SHARE),
      ground: 'by draft and load (C19), ± 35 %',
    }
  if (ptoPower_kw === null) return null
  return { from: NEAR_IDLE * ptoPower_kw, to: FULL_LOAD * ptoPower_kw, ground: 'from near idle to full load of its PTO power' }
}

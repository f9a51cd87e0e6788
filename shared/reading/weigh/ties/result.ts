/** Weights of a result worked out by hand: right to its last place, rounded roughly, wrong, or left blank. */
import { RESULT_BLANK, ROUGH_RESULT, ROUGH_SHARE, UNKNOWN_SPREAD, WRONG_SUM, WRONG_SUM_SPREAD } from '../thresholds.ts'

export interface Ending {
  holds: number
  fails: number
  silent: number
}

const FAILS: Ending = { holds: 0, fails: WRONG_SUM / WRONG_SUM_SPREAD, silent: 0 }
export const HOLDS: Ending = { holds: 1 - WRONG_SUM, fails: 0, silent: 0 }

/** The result is blank: nothing was claimed. */
export const NOT_WRITTEN: Ending = { holds: 0, fails: 0, silent: RESULT_BLANK }
/** A part cannot be read: any result is as likely as another. */
export const UNKNOWN: Ending = { holds: 0, fails: 0, silent: 1 / UNKNOWN_SPREAD }

export const exact = (holds: boolean): Ending => (holds ? HOLDS : FAILS)

/**
 * A result with decimals, rounded to its last place or, rarely, only roughly.
 * @param written in its last places. @param computed the same unit, unrounded.
 */
export function rounded(written: number, computed: number, roughly: boolean): Ending {
  const off = Math.abs(written - computed)
  if (off <= 0.5 + 1e-9) return roughly ? { holds: (1 - WRONG_SUM) * (1 - ROUGH_RESULT), fails: 0, silent: 0 } : HOLDS
  if (!roughly) return FAILS
  const window = computed * ROUGH_SHARE
  if (off > Math.max(window, 1.5)) return FAILS
  return { holds: ((1 - WRONG_SUM) * ROUGH_RESULT) / Math.max(2, 2 * window), fails: 0, silent: 0 }
}

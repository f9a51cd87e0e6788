/** Weights of a result worked out by hand: right to its last place, rounded roughly, wrong, or left blank. */
import { RESULT_BLANK, ROUGH_RESULT, ROUGH_SHARE, UNKNOWN_SPREAD, WRONG_SUM, WRONG_SUM_SPREAD } from '../thresholds.ts'

export interface Ending {
  holds: number
  fails: number
  silent: number
}

const FAILS: Ending = { holds: 0, fails: WRONG_SUM / WRONG_SUM_SPREAD, silent: 0 }
const HOLDS: Ending = { holds: 1 - WRONG_SUM, fails: 0, silent: 0 }

/** The result is blank: nothing was claimed. */
export const NOT_WRITTEN: Ending = { holds: 0, fails: 0, silent: RESULT_BLANK }
/** A part cannot be read: any result is as likely as another. */
export const UNKNOWN: Ending = { holds: 0, fails: 0, silent: 1 / UNKNOWN_SPREAD }

export const exact = (holds: boolean): Ending => (holds ? HOLDS : FAILS)

/**
 * A result with decimals, rounded to its last place or, rarely, only roughly.
 * @param written in its last places. @param computed the same unit, unrounded. @param slack how far `computed` may be off
 * because one of its parts was rounded before.
 */
export function rounded(written: number, computed: number, roughly: boolean, slack = 0): Ending {
  const off = Math.abs(written - computed)
  const close = roughly ? 1 - ROUGH_RESULT : 1
  if (off <= 0.5 + slack + 1e-9) return { holds: ((1 - WRONG_SUM) * close) / (1 + 2 * slack), fails: 0, silent: 0 }
  if (!roughly) return FAILS
  const window = computed * ROUGH_SHARE
  if (off > Math.max(window, 1.5)) return FAILS
  return { holds: ((1 - WRONG_SUM) * ROUGH_RESULT) / Math.max(2, 2 * window), fails: 0, silent: 0 }
}

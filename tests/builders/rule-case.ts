/** Pairs of sheets for the rules: one that fires, one that just does not. */
import type { CheckOptions } from '../../shared/checks/context.ts'
import type { Severity } from '../../shared/checks/rule.ts'
import type { Facts } from '../../shared/trial/facts.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import { numbered } from './readings.ts'

export interface Sheet {
  readings?: Readings
  facts?: Facts
  options?: CheckOptions
}

/** One sheet that fires the rule with that severity, and one that just does not fire it (or not that hard). */
export interface Case {
  id: string
  severity: Severity
  fires: Sheet
  not: Sheet
  /** A word of the finding's text. */
  says?: string | RegExp
}

export const sheet = (readings: Readings, facts?: Facts): Sheet => ({ readings, ...(facts ? { facts } : {}) })
export const given = (facts: Facts): Sheet => ({ facts })
export const row = (id: string, severity: Severity, fires: Sheet, not: Sheet, says?: string | RegExp): Case => ({
  id,
  severity,
  fires,
  not,
  ...(says ? { says } : {}),
})

export const depths = (...values: number[]) => ({ ...numbered('depth_cm', values), depth_mean_written_cm: undefined })
export const widths = (width: number) => ({ ...numbered('width_m', Array(5).fill(width)), width_mean_written_m: undefined })
export const ways = (load: number, free: number) => ({
  ...numbered('dist_load_m', [load, load]),
  ...numbered('dist_noload_m', [free, free]),
})
export const times = (...t: number[]) => ({
  ...numbered(
    'speed_t_s',
    [undefined, undefined, undefined].map((_, i) => t[i] ?? null),
  ),
})
export const QUAD = { side_ab_m: 62.1, side_bc_m: 44.1, side_cd_m: 61.1, side_da_m: 43.6, diag_ac_m: 75, diag_bd_m: 76.2 }
export const other = (facts: Partial<NonNullable<Facts['otherSheets']>[number]>): Facts => ({
  tractorSerial: 'T1',
  otherSheets: [{ sheetCode: 'ANDER00001', ...facts }],
})
export const stop = (from: string | null, to: string | null, off = false) => ({
  'stop_from[1]': from,
  'stop_to[1]': to,
  'stop_engine_off[1]': off,
})
export const copied = (n: number) => ({
  readings: Object.fromEntries(
    Object.entries(numbered('depth_cm', [14.5, 15, 15.5, 14, 16, 15, 14.5, 15.5, 16.5, 15])).slice(0, n),
  ),
})

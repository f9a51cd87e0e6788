/** What is written on a sheet, in the reader's own words: one value a cell, and what was done wrong on purpose. */

/** Number, 'HH:MM', 'YYYY-MM-DD', an option, true or false, or null for left blank. */
export type Written = number | string | boolean | null

export interface Scenario {
  readings: Record<string, Written>
  /** Cells crossed out, written over or written two in a box. */
  spoiled: string[]
  /** Cells that hold a result the writer got wrong. */
  wrongSum: string[]
}

/** The JSON kept beside a photo. */
export interface Truth extends Scenario {
  layout: string
  version: number
  sheet: string
  level: string
  /** What the typed block of a planned sheet says; those cells are not on the sheet. */
  planned?: Record<string, Written>
}

/** Rounds to the last written place, half away from zero as people do by hand. */
export function toPlaces(value: number, places: number): number {
  const factor = 10 ** places
  return Math.round(value * factor + 1e-9) / factor
}

/** Adds minutes to a clock time of one day. */
export function clock(minutes: number): string {
  const m = ((Math.round(minutes) % 1440) + 1440) % 1440
  return `${String(Math.floor(m / 60)).padStart(2, '0')}:${String(m % 60).padStart(2, '0')}`
}

/** What a sheet says, by layout key. A key that is absent is not on this sheet; null is on the sheet and blank. */
export type ReadingValue = number | string | boolean | null
export type Readings = Readonly<Record<string, ReadingValue | undefined>>

/** One filled cell of a repeated reading. */
export interface Repeat {
  key: string
  n: number
  value: number
}

/** Beyond any instrument and any hand: a spreadsheet cell may still hold it, and no formula is asked about it. */
const LARGEST = 1e9

/** A number formulas and rules can work with. */
export const isUsable = (value: ReadingValue | undefined): value is number =>
  typeof value === 'number' && Math.abs(value) <= LARGEST

/** The number in a cell; null when absent, blank, or not a usable number (rule L07 tells of those). */
export function numberAt(readings: Readings, key: string): number | null {
  const value = readings[key]
  return isUsable(value) ? value : null
}

/** The text in a cell; null when absent, blank, or not text. */
export function textAt(readings: Readings, key: string): string | null {
  const value = readings[key]
  return typeof value === 'string' && value !== '' ? value : null
}

/** On the sheet, and left blank. */
export const isBlank = (readings: Readings, key: string): boolean => readings[key] === null

/** The numbers in use of a repeated cell, in order: `indexes(readings, 'depth_cm')` → [1, 2, …]. Blank ones are in it. */
export function indexes(readings: Readings, stem: string): number[] {
  const found: number[] = []
  for (const key of Object.keys(readings)) {
    if (!key.startsWith(`${stem}[`) || readings[key] === undefined) continue
    const n = Number(key.slice(stem.length + 1, -1))
    if (Number.isInteger(n) && n > 0) found.push(n)
  }
  return found.sort((a, b) => a - b)
}

/** The filled cells of a repeated reading, in order. */
export function repeats(readings: Readings, stem: string): Repeat[] {
  return indexes(readings, stem).flatMap((n) => {
    const key = `${stem}[${n}]`
    const value = numberAt(readings, key)
    return value === null ? [] : [{ key, n, value }]
  })
}

/** What a limit may be set to: a slip of the pen must not silence a rule, or make it fire at every sheet. */
import { LIMITS, type LimitName, limitWords } from './limits.ts'

/** How far from the shipped value an office may go. */
const TIMES = 10

const usualOf = (name: LimitName) => LIMITS[name].value

/** From 0, or below it where the shipped limit is negative, to ten times the shipped value; no share is over 100 %. */
export function limitRange(name: LimitName): { least: number; most: number } {
  const reach = Math.abs(usualOf(name)) * TIMES
  return { least: usualOf(name) < 0 ? -reach : 0, most: LIMITS[name].unit === '%' ? Math.min(reach, 100) : reach }
}

const isLimit = (name: string): name is LimitName => Object.hasOwn(LIMITS, name)

/** The two limits of one band, where `name` is one of them. */
function bandOf(name: LimitName): { low: LimitName; high: LimitName } | null {
  const [low, high] = [name.replace('_high', '_low'), name.replace('_low', '_high')]
  return low !== high && isLimit(low) && isLimit(high) ? { low, high } : null
}

const shown = (value: number, name: LimitName) =>
  [Number(value.toPrecision(6)), LIMITS[name].unit].filter((w) => w !== '').join(' ')

/**
 * What is wrong with the limits `changed`, by name.
 * @param set every limit set otherwise than shipped, the changes among them, each in its own unit
 */
export function limitProblems(set: Readonly<Record<string, number>>, changed: readonly string[]): Record<string, string> {
  const setTo = (name: LimitName) => set[name] ?? usualOf(name)
  const found = changed.filter(isLimit).flatMap((name) => {
    const { least, most } = limitRange(name)
    if (setTo(name) < least || setTo(name) > most)
      return [[name, `The ${limitWords(name)} must lie between ${shown(least, name)} and ${shown(most, name)}.`]]
    const band = bandOf(name)
    if (!band || setTo(band.low) < setTo(band.high)) return []
    const [low, high] = [limitWords(band.low), limitWords(band.high)]
    return [
      [
        name,
        `The ${low}, ${shown(setTo(band.low), band.low)}, must be less than the ${high}, ${shown(setTo(band.high), band.high)}.`,
      ],
    ]
  })
  return Object.fromEntries(found)
}

/** From digits in boxes to values: numbers as integers of the last printed place, times in minutes, dates in days. */
import type { CombKind } from './patterns.ts'
import type { Value } from './types.ts'

const DAY_MS = 86_400_000

export const placesOf = (format: string): number => {
  const point = format.indexOf('.')
  return point < 0 ? 0 : format.length - point - 1
}

/** The count that stands for what the digits say: last places, minutes, days since 1970; null where no clock or calendar knows it. */
export function countOf(digits: readonly number[], kind: CombKind): number | null {
  const number = (from: number, to: number) => digits.slice(from, to).reduce((all, d) => all * 10 + Math.max(d, 0), 0)
  if (kind === 'digits') return number(0, digits.length)
  if (kind === 'time') {
    const hours = number(0, 2)
    const minutes = number(2, 4)
    return hours < 24 && minutes < 60 ? hours * 60 + minutes : null
  }
  const [day, month, year] = [number(0, 2), number(2, 4), number(4, 8)]
  const date = new Date(Date.UTC(year, month - 1, day))
  const real = date.getUTCFullYear() === year && date.getUTCMonth() === month - 1 && date.getUTCDate() === day
  return real && year >= 2000 ? date.getTime() / DAY_MS : null
}

export const dayCount = (date: string): number => Date.parse(`${date}T00:00:00Z`) / DAY_MS

const two = (n: number) => String(n).padStart(2, '0')

/** A count as a reading's value. */
export function countToValue(count: number, kind: CombKind, places: number): Value {
  if (kind === 'time') return `${two(Math.floor(count / 60))}:${two(count % 60)}`
  if (kind === 'date') return new Date(count * DAY_MS).toISOString().slice(0, 10)
  return Number((count / 10 ** places).toFixed(places))
}

/** Figures of a comparison as people read them. Pure. */
import type { Interval } from '../../../shared/schemas/comparison.ts'
import { roundByUncertainty } from '../../../shared/trial/format.ts'

export const minus = (text: string): string => text.replace(/^-/, '−')

/** A p value to three places; smaller ones are only said to be so. */
export const pText = (p: number): string => (p < 0.001 ? '< 0.001' : p.toFixed(3))

/** Degrees of freedom: whole ones plain, Welch's with one decimal. */
export const dfText = (df: number): string => (Number.isInteger(df) ? String(df) : df.toFixed(1))

/** A figure with one place more than half its interval allows: enough to check the sentence by. */
export function inInterval(value: number, [from, to]: Interval): string {
  return minus(roundByUncertainty(value, (to - from) / 20).value)
}

/** A mean beside others: three figures. */
export const meanText = (value: number): string => minus(Math.abs(value) < 1000 ? value.toPrecision(3) : value.toFixed(0))

export const intervalText = ([from, to]: Interval): string => `${inInterval(from, [from, to])} to ${inInterval(to, [from, to])}`

/** Sums of squares and their like: five figures. */
export const squareText = (value: number): string => String(Number(value.toPrecision(5)))

/** A figure with its ±; four figures where none is known. */
export function figureText(value: number, U: number | null): string {
  const shown = roundByUncertainty(value, U)
  return minus(shown.value)
}

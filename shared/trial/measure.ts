/**
 * A value on its way to a result: with the cells it came from, and each part of its standard uncertainty (JCGM 100:2008).
 * Or the reason why there is none, which travels through every formula.
 */
import type { Readings } from './readings.ts'

export interface Part {
  name: string
  /** Standard uncertainty this part alone would give, in the unit of the value. */
  u: number
}

export interface Reason {
  code: 'blank' | 'missing_fact' | 'impossible' | 'stopped' | 'not_on_sheet'
  text: string
  /** The rule that stopped it, with `stopped`. */
  rule?: string
}

export interface Known {
  known: true
  value: number
  parts: Part[]
  cells: string[]
  assumes: string[]
}

export interface Lacking {
  known: false
  reason: Reason
  cells: string[]
}

export type Measure = Known | Lacking

export const known = (value: number, cells: string[], parts: Part[] = [], assumes: string[] = []): Known => ({
  known: true,
  value,
  cells,
  parts,
  assumes,
})
export const lacking = (code: Reason['code'], text: string, cells: string[] = []): Lacking => ({
  known: false,
  reason: { code, text },
  cells,
})

/** What these cells would have told: blank when one of them is on the sheet, else not on this sheet. */
export const unwritten = (readings: Readings, cells: string[], text: { blank: string; absent: string }): Lacking =>
  cells.some((cell) => readings[cell] !== undefined)
    ? lacking('blank', text.blank, cells)
    : lacking('not_on_sheet', text.absent, cells)

/** Independent parts added in quadrature. */
export const standardUncertainty = (parts: readonly Part[]): number =>
  Math.sqrt(parts.reduce((sum, part) => sum + part.u ** 2, 0))

const distinct = <T>(list: readonly T[]): T[] => [...new Set(list)]

/** Parts of one name are one part. */
function gathered(parts: readonly Part[]): Part[] {
  const names = distinct(parts.map((part) => part.name))
  return names.map((name) => ({ name, u: standardUncertainty(parts.filter((part) => part.name === name)) }))
}

/**
 * value = compute(inputs), with each input's parts carried through by its own slope (JCGM 100 5.1.2), taken by central
 * differences: exact enough for products and quotients, and the same for every formula. Inputs must be independent.
 */
export function derive(inputs: readonly Measure[], compute: (...values: number[]) => number): Measure {
  const known_: Known[] = []
  for (const input of inputs) {
    if (!input.known) return { ...input, cells: distinct(inputs.flatMap((m) => m.cells)) }
    known_.push(input)
  }
  const values = known_.map((m) => m.value)
  const value = finiteOrNaN(values, compute)
  const cells = distinct(known_.flatMap((m) => m.cells))
  if (!Number.isFinite(value))
    return { known: false, reason: { code: 'impossible', text: 'The readings give no finite figure.' }, cells }
  const parts = known_.flatMap((m, i) => {
    const slope = slopeAt(values, i, compute)
    return m.parts.map((part) => ({ name: part.name, u: Math.abs(slope) * part.u }))
  })
  if (!parts.every((part) => Number.isFinite(part.u)))
    return { known: false, reason: { code: 'impossible', text: 'The readings give no finite figure.' }, cells }
  return known(value, cells, gathered(parts), distinct(known_.flatMap((m) => m.assumes)))
}

/** A formula refuses what has no figure (a division by nought) with a RangeError: here that is an answer. Other errors are bugs. */
function finiteOrNaN(values: readonly number[], compute: (...values: number[]) => number): number {
  try {
    return compute(...values)
  } catch (error) {
    if (error instanceof RangeError) return Number.NaN
    throw error
  }
}

function slopeAt(values: readonly number[], i: number, compute: (...values: number[]) => number): number {
  const x = values[i] ?? 0
  // The step that balances cut-off and rounding for a central difference.
  const step = Math.cbrt(Number.EPSILON) * Math.max(Math.abs(x), 1e-3)
  const at = (shift: number) =>
    finiteOrNaN(
      values.map((v, j) => (j === i ? v + shift : v)),
      compute,
    )
  return (at(step) - at(-step)) / (2 * step)
}

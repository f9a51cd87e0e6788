/** From what is typed to a value of the cell, and from a value to the digits in its boxes. */
import { valueProblem } from '../../../../shared/layouts/cell-value.ts'
import { type CombCell, isComb, type LayoutCell } from '../../../../shared/layouts/layout.ts'
import type { Value, Values } from '../../../../shared/schemas/sheet.ts'

const boxCount = (cell: CombCell) => cell.format.replaceAll(/[^9]/g, '').length
const places = (cell: CombCell) => (cell.format.includes('.') ? cell.format.length - cell.format.indexOf('.') - 1 : 0)

const scaleOf = (cell: CombCell, values: Values): number => {
  const unit = cell.scale ? values[cell.scale.by] : null
  return (typeof unit === 'string' && cell.scale?.factors[unit]) || 1
}

export type Typed = { value: Value; problem: null } | { value: null; problem: string }

/**
 * Digits alone fill the comb from its right end, as on paper: 140 in a comb of 99.9 is 14.0. A typed point or comma stands
 * where it is typed. Clock times and days are their digits.
 */
export function typedValue(cell: LayoutCell, text: string, values: Values): Typed {
  const written = text.trim()
  if (written === '') return refused('Type its digits.')
  if (!isComb(cell)) return checked(cell, written)
  const digits = written.replaceAll(/\D/g, '')
  if (cell.kind === 'time') return checked(cell, digits.padStart(4, '0').replace(/^(\d\d)(\d\d)$/, '$1:$2'))
  if (cell.kind === 'date') return checked(cell, digits.replace(/^(\d\d)(\d\d)(\d{4})$/, '$3-$2-$1'))
  if (!/^\d*[.,]?\d*$/.test(written) || digits === '') return refused(`${cell.label}: digits only, as in ${cell.format}.`)
  const pointed = /[.,]/.test(written)
  const number = pointed ? Number(written.replace(',', '.')) : Number(digits) / 10 ** places(cell)
  return checked(cell, rounded(number * scaleOf(cell, values)))
}

const rounded = (n: number) => Math.round(n * 1e6) / 1e6
const refused = (problem: string): Typed => ({ value: null, problem })

function checked(cell: LayoutCell, value: Value): Typed {
  const problem = valueProblem(cell, value)
  return problem ? refused(problem) : { value, problem: null }
}

/** One character a box, right-aligned, leading boxes empty; null where the value does not fit the boxes. */
export function boxCharacters(cell: CombCell, value: Value, values: Values): string[] | null {
  const count = boxCount(cell)
  if (value === null || typeof value === 'boolean') return Array.from({ length: count }, () => '')
  const text = charactersOf(cell, value, values)
  if (text === null || text.length > count) return null
  return [...text.padStart(count)].map((c) => c.trim())
}

/** Null where the boxes cannot hold it: pressures in bar need their unit before they are hundredths. */
function charactersOf(cell: CombCell, value: number | string, values: Values): string | null {
  if (cell.kind === 'date') return String(value).split('-').reverse().join('')
  if (typeof value === 'string') return value.replaceAll(/\D/g, '')
  const written = value / scaleOf(cell, values)
  const text = written.toFixed(places(cell))
  return Math.abs(Number(text) - written) < 1e-6 ? text.replace('.', '') : null
}

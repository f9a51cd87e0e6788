/** Whether a value fits the cell it is for: asked by the desk while typing, by the server, and for spreadsheet cells. */
import type { Value } from '../schemas/sheet.ts'
import { isComb, type LayoutCell } from './layout.ts'

/** 23:59 is the last; 24:00 is written 00:00. */
const CLOCK = /^([01]\d|2[0-3]):[0-5]\d(:[0-5]\d)?$/
const DAY = /^\d{4}-\d{2}-\d{2}$/

const decimalsOf = (format: string) => (format.includes('.') ? format.length - format.indexOf('.') - 1 : 0)

/** Null when the value fits (null always does: blank), else what is wrong with it, in one sentence. */
export function valueProblem(cell: LayoutCell, value: Value): string | null {
  if (value === null) return null
  if (isComb(cell)) {
    if (cell.kind === 'time')
      return typeof value === 'string' && CLOCK.test(value) ? null : `${cell.label}: a clock time such as 09:10.`
    if (cell.kind === 'date') return typeof value === 'string' && isDay(value) ? null : `${cell.label}: a day such as 2026-10-13.`
    return numberProblem(cell.label, cell.format, value, cell.scale ? Math.min(...Object.values(cell.scale.factors)) : 1)
  }
  if (cell.kind === 'choice') {
    const options = cell.options.map((o) => o.option)
    return typeof value === 'string' && options.includes(value) ? null : `${cell.label}: one of ${options.join(', ')}.`
  }
  if (cell.kind === 'line') return typeof value === 'string' && value.length <= 500 ? null : `${cell.label}: a line of text.`
  return typeof value === 'boolean' ? null : `${cell.label}: yes or no.`
}

function isDay(text: string): boolean {
  if (!DAY.test(text)) return false
  const day = new Date(`${text}T00:00:00Z`)
  return !Number.isNaN(day.getTime()) && day.toISOString().startsWith(text)
}

function numberProblem(label: string, format: string, value: Value, finest: number): string | null {
  if (typeof value !== 'number' || !Number.isFinite(value) || value < 0) return `${label}: a number, not below 0.`
  const places = decimalsOf(format) + Math.round(-Math.log10(finest))
  const most = Number(format)
  if (value > most) return `${label}: at most ${most} fits the boxes.`
  const scaled = value * 10 ** places
  return Math.abs(scaled - Math.round(scaled)) < 1e-6
    ? null
    : `${label}: at most ${places} ${places === 1 ? 'decimal' : 'decimals'}.`
}

/** A value as people write it in this cell: 15.50 in a cell of two decimals, yes for a tick. */
export function formatValue(cell: LayoutCell | undefined, value: Value): string {
  if (value === null) return 'blank'
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  if (typeof value === 'number' && cell && isComb(cell) && !cell.scale) return value.toFixed(decimalsOf(cell.format))
  return String(value)
}

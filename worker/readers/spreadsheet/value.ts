/** From what a cell holds to a reading of its form row: clear when it can mean one thing, in doubt with the reason otherwise. */
import type { DecimalMark, FormRow } from '../../../shared/layouts/form.ts'
import type { Value } from '../../../shared/schemas/sheet.ts'
import type { BlockValue } from './block.ts'
import { type Cell, clockOf, dayOf, rawOf } from './cell.ts'
import { readNumber } from './number.ts'

export interface ValueContext {
  row: FormRow
  mark: DecimalMark
  cellRef: string
}

/** What was made of a cell: a value, or a doubt that says what stands there and what was expected. */
type Made = { value: Value } | { doubt: string; value?: Value; candidates?: Value[] }

/** Doubts of this kind carry this rule's name: what was typed cannot be taken as it stands. */
export const TYPED_RULE = 'typed value'

export function readValue(cell: Cell, context: ValueContext): BlockValue {
  const { row, cellRef } = context
  const made = make(cell, context)
  const raw = rawOf(cell)
  const base = { unit: row.unit, cellRef, raw }
  if (!('doubt' in made)) return { ...base, value: made.value, state: 'clear', candidates: [], reasons: [] }
  const candidates = made.candidates ?? (made.value === undefined ? [] : [made.value])
  return {
    ...base,
    value: made.value ?? null,
    state: 'in doubt',
    candidates: candidates.map((value) => ({ value, p: 1 / candidates.length })),
    reasons: [
      { rule: TYPED_RULE, text: `${cellRef} holds ${raw === null ? 'nothing' : `"${raw}"`}: ${made.doubt}`, cells: [row.key] },
    ],
  }
}

function make(cell: Cell, context: ValueContext): Made {
  if (cell.kind === 'empty' || (cell.kind === 'text' && cell.text.trim() === '')) return { value: null }
  if (cell.kind === 'broken') return { doubt: cell.why }
  switch (context.row.kind) {
    case 'number':
      return makeNumber(cell, context)
    case 'time':
      return makeTime(cell)
    case 'date':
      return makeDate(cell)
    case 'text':
      return { value: rawOf(cell) }
    default:
      return makeOption(cell, context.row)
  }
}

function makeNumber(cell: Exclude<Cell, { kind: 'empty' | 'broken' }>, { row, mark }: ValueContext): Made {
  const wanted = row.unit ? `a number in ${row.unit}` : 'a number'
  if (cell.kind === 'number') return takeNumber(cell.number, row)
  if (cell.kind === 'serial')
    return { doubt: `a date or a clock time, where ${wanted} belongs. Spreadsheets make dates of numbers such as 1.5.` }
  if (cell.kind === 'boolean') return { doubt: `yes or no, where ${wanted} belongs.` }
  const { number, unit } = splitUnit(cell.text)
  const read = readNumber(number, mark)
  if (read.kind === 'not a number') return { doubt: `${wanted} belongs there.` }
  if (unit !== null && unit !== row.unit) {
    const candidates = read.kind === 'number' ? [read.number] : read.numbers
    return { doubt: `the unit "${unit}" is typed, where ${row.unit ?? 'no unit'} belongs.`, candidates }
  }
  if (read.kind === 'ambiguous') {
    const meanings = read.numbers.join(' or ')
    return { doubt: `it can mean ${meanings}. The form says "${mark}" is the decimal mark.`, candidates: read.numbers }
  }
  return takeNumber(read.number, row)
}

/** Trailing words are taken for a unit: "15,2 cm". */
function splitUnit(text: string): { number: string; unit: string | null } {
  const match = /^\s*([-+\u2212]?[\d.,\s\u00a0\u2009\u202f]*\d[.,]?)\s*([^\d\s].*?)?\s*$/u.exec(text)
  return match?.[2] ? { number: match[1]!, unit: match[2] } : { number: text, unit: null }
}

/** A typed number has the places and the size of the sheet's boxes; binary fractions of a calculation are rounded to them. */
function takeNumber(number: number, row: FormRow): Made {
  if (!Number.isFinite(number)) return { doubt: 'that is no number.' }
  const scale = 10 ** row.places
  const rounded = Math.round(number * scale) / scale
  const boxes = row.format ?? ''
  if (Math.abs(rounded - number) > 1e-9 * Math.max(1, Math.abs(number))) {
    return { doubt: `more places than the sheet's ${boxes}.`, value: number, candidates: [number, rounded] }
  }
  if (rounded < 0) return { doubt: 'it is below zero.', value: rounded }
  if (row.largest !== null && rounded > row.largest)
    return { doubt: `it is larger than the sheet's ${boxes} can hold.`, value: rounded }
  return { value: rounded }
}

function makeTime(cell: Exclude<Cell, { kind: 'empty' | 'broken' }>): Made {
  const wanted = 'a clock time such as 09:10 belongs there.'
  if (cell.kind === 'serial' || cell.kind === 'number') {
    const serial_d = cell.kind === 'serial' ? cell.serial_d : cell.number
    // A full day off (24:00, or a date with the time) is not one clock time any more.
    return serial_d >= 0 && serial_d < 1 ? { value: clockOf(serial_d) } : { doubt: wanted }
  }
  if (cell.kind === 'boolean') return { doubt: wanted }
  const match = /^([01]?\d|2[0-3])[:.h]([0-5]\d)(?::([0-5]\d))?$/.exec(cell.text.trim())
  if (!match) return { doubt: wanted }
  const [, hours = '', minutes = '', seconds] = match
  return { value: [hours.padStart(2, '0'), minutes, ...(seconds && seconds !== '00' ? [seconds] : [])].join(':') }
}

/** Serials from 2000-01-01 to 2099-12-31: a bare number outside was not meant as a date. */
const DAYS = { first: 36_526, last: 73_050 } as const

function makeDate(cell: Exclude<Cell, { kind: 'empty' | 'broken' }>): Made {
  const wanted = 'a date such as 2026-05-14 belongs there.'
  if (cell.kind === 'serial' || cell.kind === 'number') {
    const serial_d = cell.kind === 'serial' ? cell.serial_d : cell.number
    return serial_d >= DAYS.first && serial_d < DAYS.last + 1 ? { value: dayOf(serial_d) } : { doubt: wanted }
  }
  if (cell.kind === 'boolean') return { doubt: wanted }
  const text = cell.text.trim()
  const iso = /^(\d{4})-(\d{1,2})-(\d{1,2})$/.exec(text)
  if (iso) return dateOrDoubt([toDay(iso[1]!, iso[2]!, iso[3]!)], wanted)
  const local = /^(\d{1,2})([-./])(\d{1,2})\2(\d{4})$/.exec(text)
  if (!local) return { doubt: wanted }
  const [, first = '', sign, second = '', year = ''] = local
  const dayFirst = toDay(year, second, first)
  // Hyphens and points stand as on the sheet, day first; with slashes both orders are in use.
  return dateOrDoubt(sign === '/' ? [dayFirst, toDay(year, first, second)] : [dayFirst], wanted)
}

function dateOrDoubt(days: Array<string | null>, wanted: string): Made {
  const possible = [...new Set(days.filter((day) => day !== null))]
  if (possible.length > 1) return { doubt: `it can mean ${possible.join(' or ')}.`, candidates: possible }
  return possible[0] ? { value: possible[0] } : { doubt: wanted }
}

function toDay(year: string, month: string, day: string): string | null {
  const text = `${year}-${month.padStart(2, '0')}-${day.padStart(2, '0')}`
  const date = new Date(`${text}T00:00:00Z`)
  return !Number.isNaN(date.getTime()) && date.toISOString().startsWith(text) ? text : null
}

/** Words for a tick. A single tick is true or false; a choice of yes and no keeps the words. */
const YES = new Set(['yes', 'y', 'x', '✓', '✔', 'true', '1'])
const NO = new Set(['no', 'n', 'false', '0'])

function makeOption(cell: Exclude<Cell, { kind: 'empty' | 'broken' }>, row: FormRow): Made {
  const typed = (rawOf(cell) ?? '').trim().toLowerCase()
  const yesNo = row.options[0]?.option === 'yes' && row.options.length === 2
  if (yesNo && (YES.has(typed) || NO.has(typed))) {
    if (row.kind === 'tick') return { value: YES.has(typed) }
    return { value: YES.has(typed) ? 'yes' : 'no' }
  }
  const found = row.options.find((o) => o.option.toLowerCase() === typed || o.label.toLowerCase() === typed)
  if (found && !yesNo) return { value: found.option }
  return {
    doubt: `one of ${row.options.map((o) => (o.label === o.option ? o.option : `${o.option} (${o.label})`)).join(', ')} belongs there.`,
  }
}

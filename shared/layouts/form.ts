/**
 * The spreadsheet form of a layout, as data: what the workbook and the CSV hold, and where. Writing and reading both go by it,
 * so neither can drift from the printed sheet. A workbook has one run a column, a CSV one run a row.
 */
import { isComb, type Layout, type LayoutCell } from './layout.ts'

/** What a value is typed as. number: in the stored unit; tick: yes or no; text: kept as it stands. */
export type FormKind = 'number' | 'time' | 'date' | 'tick' | 'choice' | 'text'

export interface FormRow {
  key: string
  label: string
  unit: string | null
  kind: FormKind
  need: LayoutCell['need']
  section: number
  /** What a choice or tick takes, first what is stored, then words that mean it. */
  options: ReadonlyArray<{ option: string; label: string }>
  /** Printed format of a comb, such as 99.9: whole digits and places a value may have. */
  format: string | null
  /** Largest number of decimal places, by the format and the finest unit of `scale`. */
  places: number
  /** Largest value the format can hold. */
  largest: number | null
  hard: readonly [number, number] | null
  plausible: readonly [number, number] | null
  instrument: string | null
  /** The unit stands in this choice instead. */
  unitBy: string | null
  /** The plan of a printed sheet knows it; it may stay empty beside a sheet code. */
  planned: boolean
}

/** The head of a form: what is true of a whole workbook, and of each run. */
export const FORM_HEAD = { layout: 'layout', version: 'version', decimalMark: 'decimal_mark', sheetCode: 'sheet_code' } as const
/** Columns of the workbook (1 = A): label, unit, key; values from `firstValue` on, one run each. */
export const FORM_COLUMNS = { label: 1, unit: 2, key: 3, firstValue: 4 } as const
/** Runs one workbook holds. */
export const FORM_RUNS = 20
export const FORM_SHEET = 'Runs'
export const DECIMAL_MARKS = ['.', ','] as const
export type DecimalMark = (typeof DECIMAL_MARKS)[number]

const YES_NO = [
  { option: 'yes', label: 'yes' },
  { option: 'no', label: 'no' },
] as const

/** The rows of the form in the sheet's order. Signatures and lines that show who somebody is stay on paper. */
export function formRows(layout: Layout): FormRow[] {
  return layout.cells.filter((cell) => cell.kind !== 'signature' && !('personal' in cell && cell.personal)).map(toRow)
}

/** What stands above a CSV column: `jar_start_ml [mL]`, `gear`. */
export const csvHeading = (row: Pick<FormRow, 'key' | 'unit'>) => (row.unit ? `${row.key} [${row.unit}]` : row.key)

/** Takes a CSV heading apart; null when it cannot be one. */
export function parseCsvHeading(text: string): { key: string; unit: string | null } | null {
  const match = /^\s*([a-z][a-z0-9_]*(?:\[\d+\])?)\s*(?:\[([^\]]*)\])?\s*$/.exec(text)
  return match ? { key: match[1]!, unit: match[2]?.trim() || null } : null
}

function toRow(cell: LayoutCell): FormRow {
  const base = { key: cell.key, label: cell.label, need: cell.need, section: cell.section }
  const plain = {
    unit: null,
    options: [],
    format: null,
    places: 0,
    largest: null,
    hard: null,
    plausible: null,
    instrument: null,
    unitBy: null,
    planned: false,
  }
  if (cell.kind === 'tick') return { ...base, ...plain, kind: 'tick', options: YES_NO }
  if (cell.kind === 'choice') {
    const options = cell.options.map(({ option, label }) => ({ option, label }))
    return { ...base, ...plain, kind: 'choice', options: isYesNo(options) ? YES_NO : options }
  }
  if (!isComb(cell)) return { ...base, ...plain, kind: 'text' }
  const number =
    cell.kind === 'digits' ? sizeOf(cell.format, Object.values(cell.scale?.factors ?? {})) : { places: 0, largest: null }
  return {
    ...base,
    ...plain,
    ...number,
    kind: cell.kind === 'digits' ? 'number' : cell.kind,
    unit: cell.unit,
    format: cell.format,
    hard: cell.hard ?? null,
    plausible: cell.plausible ?? null,
    instrument: cell.instrument ?? null,
    unitBy: cell.scale?.by ?? null,
    planned: cell.planned ?? false,
  }
}

const isYesNo = (options: ReadonlyArray<{ option: string }>) => options.map((o) => o.option).join() === 'yes,no'

/** A scaled comb (tyre pressures) is typed in its unit, so the finest factor adds its places. */
function sizeOf(format: string, factors: number[]): { places: number; largest: number } {
  const [whole = '', part = ''] = format.split('.')
  const finest = Math.min(1, ...factors)
  return { places: part.length + Math.round(-Math.log10(finest)), largest: Number(part ? `${whole}.${part}` : whole) }
}

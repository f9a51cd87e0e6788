/** From the cells of one run to a block: the same for workbook and CSV. */
import { type DecimalMark, FORM_HEAD, type FormRow, formRows } from '../../../shared/layouts/form.ts'
import type { Layout } from '../../../shared/layouts/layout.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import { parseSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { Block, BlockValue } from './block.ts'
import { type Cell, rawOf } from './cell.ts'
import { readValue, TYPED_RULE } from './value.ts'

/** One run as found in a file: cells by key, and the unit the file states for each (undefined: the file states none). */
export interface RawRun {
  number: number
  /** Names the run in messages: "column D of Runs". */
  place: string
  layout: string
  version: number
  mark: DecimalMark
  sheetCode: Cell
  cells: ReadonlyMap<string, { cell: Cell; cellRef: string; unit: string | null }>
}

/** The layout a file names, or the reason why it cannot be read. */
export function layoutOf(key: string, version: number): Layout | { reason: string } {
  return (
    findLayout(key, version) ?? {
      reason: `The form says it is "${key}" version ${version}, and there is no such layout. Nothing was kept. Take a fresh form from the layout's page and copy the values over.`,
    }
  )
}

/** True when nothing was typed for the run: it is no run. */
export const isEmptyRun = (run: RawRun) =>
  run.sheetCode.kind === 'empty' &&
  [...run.cells.values()].every(({ cell }) => rawOf(cell)?.trim() === '' || cell.kind === 'empty')

export function toBlock(run: RawRun, layout: Layout): Block {
  const rows = formRows(layout)
  const problems = [...unknownKeys(run, rows), ...missingRows(run, rows)]
  const written = rawOf(run.sheetCode)?.trim() || null
  const sheetCode = written === null ? null : parseSheetCode(written)
  if (written !== null && sheetCode === null)
    problems.push(`The sheet code "${written}" in ${run.place} is mistyped: its check character does not fit.`)
  const values = Object.fromEntries(rows.flatMap((row) => readRow(row, run)))
  const planned = sheetCode !== null && rows.every((row) => !row.planned || (values[row.key]?.raw ?? null) === null)
  const kept = planned
    ? Object.fromEntries(Object.entries(values).filter(([key]) => !rows.find((row) => row.key === key)?.planned))
    : values
  return { number: run.number, layout: layout.key, version: layout.version, sheetCode, planned, values: kept, problems }
}

function readRow(row: FormRow, run: RawRun): Array<[string, BlockValue]> {
  const found = run.cells.get(row.key)
  if (!found) return []
  const value = readValue(found.cell, { row, mark: run.mark, cellRef: found.cellRef })
  if (value.raw === null || sameUnit(found.unit, row)) return [[row.key, value]]
  const text = `${found.cellRef} holds "${value.raw}" in a row whose unit was changed to "${found.unit ?? 'none'}"; the form's unit is ${row.unit ?? 'none'}.`
  return [[row.key, { ...value, state: 'in doubt', reasons: [...value.reasons, { rule: TYPED_RULE, text, cells: [row.key] }] }]]
}

const sameUnit = (stated: string | null, row: FormRow) => (stated ?? '') === (row.unit ?? '')

function unknownKeys(run: RawRun, rows: FormRow[]): string[] {
  const known = new Set([...rows.map((row) => row.key), ...Object.values(FORM_HEAD)])
  return [...run.cells]
    .filter(([key, { cell }]) => !known.has(key) && rawOf(cell) !== null)
    .map(([key, { cell, cellRef }]) => `${cellRef} holds "${rawOf(cell)}" for "${key}", which this sheet does not have.`)
}

function missingRows(run: RawRun, rows: FormRow[]): string[] {
  const missing = rows.filter((row) => row.need === 'mandatory' && !run.cells.has(row.key)).map((row) => row.key)
  return missing.length === 0 ? [] : [`${run.place} has no place for ${missing.join(', ')}: the form was changed.`]
}

/** The columns of the wide download, in order: who and what, every reading, every result with its U. */
import { RESULTS, type ResultKey } from '../trial/result.ts'
import type { Column } from './column.ts'
import { isComb, type Layout } from './layout.ts'

export interface BookColumn extends Column {
  source:
    | { from: 'record'; field: string }
    | { from: 'reading'; key: string }
    | { from: 'result'; key: ResultKey; part: 'value' | 'U' }
}

const record = (name: string, kind: BookColumn['kind'], description: string): BookColumn => ({
  name,
  unit: null,
  kind,
  description,
  source: { from: 'record', field: name },
})

const RECORD_COLUMNS: BookColumn[] = [
  record('record', 'integer', 'number in the trial book'),
  record('version', 'integer', 'version of the record; the newest stands'),
  record('state', 'text', 'entered, or challenged while its sheet is at the desk again'),
  record('sheet', 'text', 'sheet code, with its ISO/IEC 7064 check character'),
  record('layout', 'text', 'layout and version of the sheet'),
  record('place', 'text', 'from the register of places'),
  record('demonstrator', 'text', 'from the register of people'),
  record('tractor', 'text', 'from the register of tractors'),
  record('implement', 'text', 'from the register of implements'),
  record('operation', 'text', 'what the implement does'),
  record('rules_version', 'text', 'version of the checks that were run'),
  record('formula_version', 'text', 'version of the formulas that made the results'),
  record('entered_at', 'moment', 'when it was entered, UTC'),
  record('entered_by', 'text', 'who entered it'),
]

/** A spread and a variation say how readings scatter; they are given without an uncertainty of their own. */
const hasU = (key: ResultKey): boolean => !/_(sd|cv)_/.test(key)

const figureOf = (key: ResultKey): BookColumn => ({
  name: key,
  unit: RESULTS[key].unit,
  kind: 'number',
  description: `${RESULTS[key].label}, formula ${RESULTS[key].formula}, not rounded`,
  source: { from: 'result', key, part: 'value' },
})

const uncertaintyOf = (key: ResultKey): BookColumn => ({
  name: `${key}_U`,
  unit: RESULTS[key].unit,
  kind: 'number',
  description: `expanded uncertainty of ${RESULTS[key].label}, k = 2`,
  source: { from: 'result', key, part: 'U' },
})

export function bookColumns(layouts: readonly Layout[]): BookColumn[] {
  const readings = new Map<string, BookColumn>()
  for (const layout of layouts) {
    for (const cell of layout.cells) {
      if ('personal' in cell && cell.personal) continue
      const kind = isComb(cell) ? (cell.kind === 'digits' ? 'number' : cell.kind) : cell.kind === 'tick' ? 'boolean' : 'text'
      const unit = isComb(cell) ? cell.unit : null
      const scaled = isComb(cell) && cell.scale ? `; in the unit of ${cell.scale.by}` : ''
      readings.set(cell.key, {
        name: cell.key,
        unit,
        kind,
        description: `${cell.label}, as on the sheet${scaled}`,
        source: { from: 'reading', key: cell.key },
      })
    }
  }
  const results = (Object.keys(RESULTS) as ResultKey[]).flatMap((key) =>
    hasU(key) ? [figureOf(key), uncertaintyOf(key)] : [figureOf(key)],
  )
  return [...RECORD_COLUMNS, ...readings.values(), ...results]
}

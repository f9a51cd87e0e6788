/** The columns of the long download, in order: one line a value, with everything that is known of it. */
import type { BookValue } from '../schemas/book-value.ts'
import type { Column } from './column.ts'

const COLUMNS: Record<keyof BookValue, readonly [Column['kind'], string]> = {
  record: ['integer', 'number in the trial book'],
  version: ['integer', 'version of the record; the newest stands'],
  state: ['text', 'entered, or challenged while its sheet is at the desk again'],
  sheet: ['text', 'sheet code, with its ISO/IEC 7064 check character'],
  layout: ['text', 'layout and version of the sheet'],
  trial_date: ['date', 'day of the trial'],
  place: ['text', 'from the register of places'],
  tractor: ['text', 'from the register of tractors'],
  implement: ['text', 'from the register of implements'],
  kind: ['text', 'reading: it stands on the sheet; figure: it was computed from readings'],
  key: ['text', 'which cell or which figure'],
  label: ['text', 'the same in words'],
  value: ['number', 'the number, not rounded; empty where it is none'],
  text: ['text', 'the reading where it is no number: a date, a time, a choice, true or false for a tick'],
  unit: ['text', 'unit of value, u and expanded_u'],
  u: ['number', 'standard uncertainty (JCGM 100), of figures'],
  expanded_u: ['number', 'expanded uncertainty U = k times u, of figures'],
  k: ['number', 'coverage factor of expanded_u'],
  formula: ['text', 'formula of the figure'],
  made_from: ['text', 'keys of the readings the figure was made from, parted by spaces'],
  formula_version: ['text', 'version of the formulas that made the figures'],
  rules_version: ['text', 'version of the checks that were run'],
  origin: ['text', 'ink, spreadsheet, person, plan; formula for figures'],
  cell: ['text', 'spreadsheet cell it came from'],
  settlement: ['text', 'what a person did to its doubt: kept, corrected, unreadable, blank on purpose'],
  settled_by: ['text', 'who settled it'],
  settled_at: ['moment', 'when it was settled, UTC'],
  why: ['text', 'why a person changed it, or why there is no figure'],
  ink: ['text', 'where it comes from: the picture with the part to look at (or the file), otherwise the record'],
}

export const valueColumns = (): Column[] =>
  Object.entries(COLUMNS).map(([name, [kind, description]]) => ({ name, unit: null, kind, description }))

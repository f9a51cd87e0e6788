/** What reading one page came to; the worker makes it, the intake turns it into a sheet. */
import type { Candidate, Reading, Value } from '../../../shared/schemas/sheet.ts'

export interface ReadReading {
  key: string
  value: Value
  unit: string | null
  state: 'clear' | 'in doubt'
  candidates: Candidate[]
  reasons: Reading['reasons']
  /** The spreadsheet cell, such as "Sheet!D14". */
  cellRef: string | null
}

export type PageOutcome =
  | {
      kind: 'read'
      layout: string
      layoutVersion: number
      planned: boolean
      sheetCode: string | null
      origin: 'photo' | 'spreadsheet'
      readings: ReadReading[]
      /** Lines of the typed block, as recognised. */
      planText?: string[]
      /** The flattened page in the file store. */
      pictureKey?: string | null
    }
  | { kind: 'take again'; code: string; advice: string; sheetCode?: string | null; pictureKey?: string | null }
  | { kind: 'unreadable'; reason: string }

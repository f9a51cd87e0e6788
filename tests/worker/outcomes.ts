import type { PageOutcome } from '../../server/db/intake/page-outcome.ts'
import { makeSheetCode } from '../../shared/layouts/sheet-code.ts'

/** What a sheet read from ink comes to: enough for the intake, with a code of its own. */
export const readOutcome = (jar_start_ml = 4800): Extract<PageOutcome, { kind: 'read' }> => ({
  kind: 'read',
  layout: 'tillage',
  layoutVersion: 1,
  planned: false,
  sheetCode: makeSheetCode((below) => Math.floor(Math.random() * below)),
  origin: 'photo',
  readings: [
    { key: 'jar_start_ml', value: jar_start_ml, unit: 'mL', state: 'clear', candidates: [], reasons: [], cellRef: null },
  ],
})

/** What must come out of a spreadsheet form, in the shape the photographed samples use. */
import type { SpreadsheetReading } from '../../worker/readers/spreadsheet/block.ts'
import type { ExpectedPage } from './expected.ts'

/** One entry a run. @throws Error when the file is not a form */
export function toExpectedForm(reading: SpreadsheetReading): ExpectedPage[] {
  if (reading.kind !== 'blocks') throw new Error(reading.reason)
  return reading.blocks.map(({ number, sheetCode, layout, version, values }) => ({
    page: number,
    sheet: sheetCode,
    layout,
    version,
    takeAgain: null,
    readings: Object.fromEntries(Object.entries(values).map(([key, { state, value }]) => [key, { state, value }])),
  }))
}

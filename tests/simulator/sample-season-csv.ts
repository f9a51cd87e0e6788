/** Rows of the demo season in the CSV form of the tillage layout, and the facts its registers know of a run. */
import { IMPLEMENTS, KITS, TRACTORS } from '../../server/demo/registers.ts'
import type { DemoRun } from '../../server/demo/season.ts'
import { csvLine } from '../../server/print/csv-text.ts'
import { csvHeading, FORM_HEAD, formRows } from '../../shared/layouts/form.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Facts } from '../../shared/trial/facts.ts'
import type { Written } from './scenario.ts'

export function factsOf(run: DemoRun): Facts {
  const { ratedWidth_m, operation, maxDepth_cm } = IMPLEMENTS.find((i) => i.number === run.implement)!
  const kit = KITS.find((k) => k.number === run.kit)!
  return {
    ...TRACTORS.find((t) => t.number === run.tractor)!,
    ratedWidth_m,
    operation,
    maxDepth_cm,
    ...kit,
    ruleReach_cm: kit.ruleLength_cm,
    kitCheckedOn: kit.checkedOn,
    today: run.heldOn,
    arrivedOn: run.heldOn,
  }
}

const rows = formRows(tillage1)

export const SEASON_HEADING = csvLine([
  FORM_HEAD.layout,
  FORM_HEAD.version,
  FORM_HEAD.decimalMark,
  FORM_HEAD.sheetCode,
  ...rows.map(csvHeading),
])

/** A sheet's line under that heading; ticks as words, blank cells as nothing. */
export const seasonLine = (run: DemoRun, values: Record<string, Written>): string =>
  csvLine([tillage1.key, tillage1.version, '.', run.sheetCode, ...rows.map(({ key }) => wordOf(values[key] ?? null))])

const wordOf = (value: Written): string | number =>
  value === null ? '' : value === true ? 'yes' : value === false ? 'no' : value

import { csvHeading, FORM_HEAD, formRows } from '../../shared/layouts/form.ts'
import type { Layout } from '../../shared/layouts/layout.ts'
import { csvLine } from './csv-text.ts'

/** The CSV form of a layout: its heading, and one line that already names layout, version and decimal mark. UTF-8. */
export function writeFormCsv(layout: Layout): string {
  const rows = formRows(layout)
  const heading = [FORM_HEAD.layout, FORM_HEAD.version, FORM_HEAD.decimalMark, FORM_HEAD.sheetCode, ...rows.map(csvHeading)]
  return csvLine(heading) + csvLine([layout.key, layout.version, '.', '', ...rows.map(() => '')])
}

/** The descriptor of a Data Package (version 2.0 of the standard): what the files hold, column by column. */
import { RULES_VERSION } from '../../../shared/checks/run-checks.ts'
import { type Column, headerOf } from '../../../shared/layouts/column.ts'
import { valueColumns } from '../../../shared/layouts/value-columns.ts'
import { FORMULA_VERSION } from '../../../shared/trial/result.ts'
import { recordColumns } from './tables.ts'

const PROFILES = 'https://datapackage.org/profiles/2.0'

/** Table Schema's words for our kinds; its own time would have seconds. */
const TYPES: Record<Column['kind'], { type: string; format?: string }> = {
  number: { type: 'number' },
  integer: { type: 'integer' },
  text: { type: 'string' },
  boolean: { type: 'boolean' },
  date: { type: 'date' },
  time: { type: 'time', format: '%H:%M' },
  moment: { type: 'datetime' },
}

const fieldOf = (column: Column) => ({
  name: headerOf(column),
  ...TYPES[column.kind],
  description: column.description,
  ...(column.unit ? { unit: column.unit } : {}),
})

function resource(name: string, title: string, columns: readonly Column[], keys: Record<string, unknown>) {
  return {
    name,
    type: 'table',
    title,
    path: `${name}.csv`,
    format: 'csv',
    mediatype: 'text/csv',
    encoding: 'utf-8',
    dialect: { delimiter: ',', lineTerminator: '\r\n', quoteChar: '"', doubleQuote: true, header: true },
    schema: { fields: columns.map(fieldOf), missingValues: [''], ...keys },
  }
}

/** @param from the address of the book the data were taken from */
export function dataPackage(from: string, now: Date = new Date()) {
  return {
    $schema: `${PROFILES}/datapackage.json`,
    name: 'trial-book',
    title: 'Trial book',
    description:
      'Runs of tractor fuel trials: what was written on the sheets, and the figures computed from it with their uncertainty. ' +
      'Text that a spreadsheet would run as a formula has an apostrophe in front.',
    created: now.toISOString(),
    // Versions current when the file was made; each line names the ones it was made with.
    rulesVersion: RULES_VERSION,
    formulaVersion: FORMULA_VERSION,
    sources: [{ title: 'The trial book', path: from }],
    licenses: [
      { name: 'other-closed', title: 'No licence comes with these data: ask the team that sent them before passing them on.' },
    ],
    resources: [
      resource('records', 'One line a record', recordColumns(), { primaryKey: ['record', 'version'] }),
      resource('values', 'One line a value', valueColumns(), {
        primaryKey: ['record', 'version', 'kind', 'key'],
        foreignKeys: [{ fields: ['record', 'version'], reference: { resource: 'records', fields: ['record', 'version'] } }],
      }),
    ],
  }
}

import { judgeSheet } from '../../../shared/checks/judge-sheet.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import { type RecordRow, recordSchema, type TrialRecord } from '../../../shared/schemas/record.ts'
import type { Reading } from '../../../shared/schemas/sheet.ts'
import type { Readings } from '../../../shared/trial/readings.ts'
import { buildFacts, buildReadings } from '../../builders/readings.ts'
import { buildReading } from './build-desk-sheet.ts'

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`

/**
 * The golden sheet as an entered record, its figures computed by the same shared code as on the server. `changes` change its
 * values; `origins` say of single readings where they come from and who settled them.
 */
export function buildRecord(
  changes: Readings = {},
  origins: Record<string, Partial<Reading>> = {},
  record: Partial<TrialRecord> = {},
): TrialRecord {
  const layout = findLayout('tillage')
  if (!layout) throw new Error('the tillage layout is gone')
  const values = buildReadings(changes)
  const { results } = judgeSheet(layout, values, buildFacts())
  const readings = Object.entries(values).flatMap(([key, value]) =>
    value === undefined ? [] : [{ ...buildReading(key, value), ...origins[key] }],
  )
  return recordSchema.parse({
    number: 231,
    version: 1,
    state: 'entered',
    sheetId: id(103),
    sheetCode: '7K4QM2KA0T',
    trialDate: '2026-10-14',
    place: { id: id(21), number: 21, name: 'Kelbrun' },
    demonstrator: { id: id(1), number: 12, name: 'Ossa Brandt' },
    tractor: { id: id(12), number: 12, name: 'Tarn 50' },
    implement: { id: id(31), number: 31, name: 'two-bottom plough', operation: 'plough' },
    gear: 'L3',
    run: { plot: 'upper, by the ditch', number: 2 },
    soilClass: 'medium',
    results,
    readings,
    notes: [],
    facts: {},
    rulesVersion: '1.0.0',
    formulaVersion: '1.0.0',
    layout: layout.key,
    layoutVersion: layout.version,
    enteredBy: 'Joren Abel',
    enteredAt: '2026-10-15T08:00:00.000Z',
    challenge: null,
    pages: [],
    history: [],
    versions: [{ version: 1, enteredAt: '2026-10-15T08:00:00.000Z', enteredBy: 'Joren Abel' }],
    ...record,
  })
}

/** The same as a row of the trial book. */
export const rowOf = (record: TrialRecord): RecordRow => record

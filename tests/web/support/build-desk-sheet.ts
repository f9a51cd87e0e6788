import { judgeSheet } from '../../../shared/checks/judge-sheet.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { Candidate, Doubt, Reading, Sheet, Value } from '../../../shared/schemas/sheet.ts'

export const SHEET_ID = '00000000-0000-4000-8000-0000000000aa'

export function buildReading(key: string, value: Value, candidates: Candidate[] = []): Reading {
  return {
    key,
    value,
    unit: null,
    state: candidates.length > 0 ? 'in doubt' : 'clear',
    origin: 'ink',
    candidates,
    reasons: [],
    cellRef: null,
    pageId: null,
    settlement: null,
    settledBy: null,
    settledAt: null,
    why: null,
    readValue: value,
  }
}

/** A sheet of the cells given, with the doubts the rules themselves find on it. */
export function buildDeskSheet(readings: Reading[], change: Partial<Sheet> = {}): Sheet {
  const layout = findLayout('tillage')
  if (!layout) throw new Error('the tillage layout is gone')
  const values = Object.fromEntries(readings.map((r) => [r.key, r.value]))
  const doubts = judgeSheet(layout, values, {}).findings.map(
    (f, i): Doubt => ({
      id: `00000000-0000-4000-8000-${String(i + 1).padStart(12, '0')}`,
      rule: f.rule,
      ruleVersion: f.version,
      severity: f.severity,
      cells: f.cells,
      text: f.text,
      compared: f.compared,
      settledBy: null,
      settledAt: null,
      why: null,
    }),
  )
  const open = readings.filter((r) => r.state === 'in doubt' && r.settlement === null).length
  return {
    id: SHEET_ID,
    code: null,
    fileName: null,
    state: 'waiting',
    layout: layout.key,
    layoutVersion: layout.version,
    origin: 'photo',
    arrivedAt: '2026-10-13T10:16:00.000Z',
    demonstrator: 'Mirel Tanza',
    place: 'Kelbrun',
    tractor: null,
    implement: null,
    trialDate: '2026-10-13',
    runNumber: 2,
    openDoubts: open + doubts.filter((d) => d.severity !== 'note').length,
    stops: doubts.filter((d) => d.severity === 'stop').length,
    why: null,
    answered: false,
    inHand: null,
    recordNumber: null,
    version: 1,
    planned: true,
    pages: [],
    readings,
    doubts,
    facts: {},
    sentBackReason: null,
    reason: null,
    history: [],
    ...change,
  }
}

/** The sheet as the clerk sees it: what the server said, with what was done since and not yet saved. Pure. */
import { fingerprintOf, judgeSheet } from '../../../../shared/checks/judge-sheet.ts'
import type { Finding } from '../../../../shared/checks/rule.ts'
import type { Layout } from '../../../../shared/layouts/layout.ts'
import type { Doubt, Reading, Sheet, Values } from '../../../../shared/schemas/sheet.ts'
import type { Facts } from '../../../../shared/trial/facts.ts'
import type { Results } from '../../../../shared/trial/result.ts'
import { type DeskOp, doubtAsFinding } from './desk-op.ts'

export interface DeskDoubt {
  fingerprint: string
  rule: string
  severity: Doubt['severity']
  cells: readonly string[]
  text: string
  settledBy: string | null
  why: string | null
}

export interface DeskView {
  readings: ReadonlyMap<string, Reading>
  doubts: readonly DeskDoubt[]
  values: Values
  facts: Facts
  results: Results
}

/** Rules the browser cannot ask: they look into a register. They stand until the server says otherwise. */
const OF_THE_SERVER = new Set(['register'])
/** "Left blank" is no question once a person said so. */
export const BLANK_RULES = new Set(['Q56', 'Q57'])

export const valuesOf = (readings: Iterable<Reading>): Values => Object.fromEntries([...readings].map((r) => [r.key, r.value]))

export function viewOf(sheet: Sheet, layout: Layout, ops: readonly DeskOp[], me: string): DeskView {
  const readings = new Map(sheet.readings.map((r) => [r.key, r]))
  const letStand = new Map<string, { by: string; why: string | null } | null>()
  for (const op of ops) {
    if (op.kind === 'settle' || op.kind === 'take back') {
      const before = readings.get(op.key)
      if (before) readings.set(op.key, afterOp(before, op, me))
    } else letStand.set(op.fingerprint, op.kind === 'let stand' ? { by: me, why: op.why } : null)
  }
  const values = valuesOf(readings.values())
  const facts = sheet.facts as Facts
  const judged = judgeSheet(layout, values, facts)
  const known = new Map(sheet.doubts.map((d) => [fingerprintOf(doubtAsFinding(d)), d]))
  const kept = sheet.doubts.filter((d) => OF_THE_SERVER.has(d.rule) && sameValues(sheet, d, values))
  const findings = [...kept.map((d) => ({ ...doubtAsFinding(d), severity: d.severity, text: d.text })), ...judged.findings]
  const doubts = findings
    .filter((f) => !answered(f, readings))
    .map((f): DeskDoubt => {
      const fingerprint = fingerprintOf(f)
      const local = letStand.get(fingerprint)
      const saved = known.get(fingerprint)
      const settled = local === undefined ? { by: saved?.settledBy ?? null, why: saved?.why ?? null } : local
      const { rule, severity, cells, text } = f
      return { fingerprint, rule, severity, cells, text, settledBy: settled?.by ?? null, why: settled?.why ?? null }
    })
  return { readings, doubts, values, facts, results: judged.results }
}

function afterOp(before: Reading, op: Extract<DeskOp, { kind: 'settle' | 'take back' }>, me: string): Reading {
  if (op.kind === 'take back') return { ...before, value: before.readValue, settlement: null, settledBy: null, why: null }
  const value = op.how === 'kept' ? before.value : op.how === 'corrected' ? op.value : null
  return { ...before, value, settlement: op.how, settledBy: me, why: op.why || null }
}

const sameValues = (sheet: Sheet, doubt: Doubt, values: Values) =>
  doubt.cells.every((key) => sheet.readings.find((r) => r.key === key)?.value === values[key])

const answered = (finding: Pick<Finding, 'rule' | 'cells'>, readings: ReadonlyMap<string, Reading>) =>
  BLANK_RULES.has(finding.rule) &&
  finding.cells.every((key) => ['blank on purpose', 'unreadable'].includes(readings.get(key)?.settlement ?? ''))

/** Results and doubts as they would be with one value exchanged: recomputed while it is typed. */
export function judgeWith(view: DeskView, layout: Layout, key: string, value: Reading['value']) {
  return judgeSheet(layout, { ...view.values, [key]: value }, view.facts)
}

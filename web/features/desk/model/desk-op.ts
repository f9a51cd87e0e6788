/** What a clerk did, kept as a value: shown at once, sent in order, undone by its opposite. */

import { fingerprintOf } from '../../../../shared/checks/judge-sheet.ts'
import type { Settlement, Sheet, Value } from '../../../../shared/schemas/sheet.ts'

export type DeskOp =
  | { kind: 'settle'; key: string; how: Settlement; value: Value; why: string }
  | { kind: 'let stand'; fingerprint: string; why: string }
  | { kind: 'take back'; key: string }
  | { kind: 'open again'; fingerprint: string }

/** The act that undoes another. */
export const oppositeOf = (op: DeskOp): DeskOp | null => {
  if (op.kind === 'settle') return { kind: 'take back', key: op.key }
  if (op.kind === 'let stand') return { kind: 'open again', fingerprint: op.fingerprint }
  return null
}

export interface SettleBody {
  path: 'settle-reading' | 'settle-doubt' | 'unsettle'
  json: Record<string, unknown>
}

/** The request an act becomes on the sheet as it now is; null when what it meant is gone. */
export function bodyOf(op: DeskOp, sheet: Sheet): SettleBody | null {
  const { version } = sheet
  if (op.kind === 'settle') {
    const { key, how, value, why } = op
    return { path: 'settle-reading', json: { version, key, how, why, ...(how === 'corrected' ? { value } : {}) } }
  }
  if (op.kind === 'take back') return { path: 'unsettle', json: { version, key: op.key } }
  const doubt = sheet.doubts.find((d) => fingerprintOf(doubtAsFinding(d)) === op.fingerprint)
  if (!doubt) return null
  if (op.kind === 'let stand') return { path: 'settle-doubt', json: { version, doubtId: doubt.id, why: op.why } }
  return { path: 'unsettle', json: { version, doubtId: doubt.id } }
}

/** Whether the sheet already says what an act was to make it say, whoever did it. */
export function isDoneIn(op: DeskOp, sheet: Sheet): boolean {
  if (op.kind === 'settle' || op.kind === 'take back') {
    const reading = sheet.readings.find((r) => r.key === op.key)
    if (op.kind === 'take back') return reading?.settlement === null
    return reading !== undefined && reading.settlement !== null && reading.value === op.value
  }
  const doubt = sheet.doubts.find((d) => fingerprintOf(doubtAsFinding(d)) === op.fingerprint)
  return op.kind === 'let stand' ? doubt?.settledBy !== null : doubt?.settledBy === null
}

/** A doubt of the server as the rule found it, so that both have one fingerprint. */
export const doubtAsFinding = (doubt: Sheet['doubts'][number]) => ({
  rule: doubt.rule,
  cells: doubt.cells,
  compared: doubt.compared as Record<string, number | string>,
})

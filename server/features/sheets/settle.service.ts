/** Settling: keep, correct, mark unreadable, leave blank on purpose; let a doubt stand; take any of it back. */
import { UserError } from '../../../shared/errors.ts'
import { formatValue, valueProblem } from '../../../shared/layouts/cell-value.ts'
import type { LayoutCell } from '../../../shared/layouts/layout.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { Origin, SettleDoubt, SettleReading, Sheet, Value } from '../../../shared/schemas/sheet.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import type { ReadingEntity } from '../../db/entities/reading.ts'
import type { SheetEntity } from '../../db/entities/sheet.ts'
import { findDoubt, settleDoubt } from '../../db/repositories/doubt.ts'
import { findReading, settleReading } from '../../db/repositories/reading.ts'
import type { Deps } from '../../http/route.ts'
import { getSheet, writeOnSheet } from './change-sheet.ts'

export const SETTLED_IN = ['waiting', 'settled', 'challenged'] as const

export async function settleOneReading(deps: Deps, actor: User, id: string, input: SettleReading): Promise<Sheet> {
  await writeOnSheet({ deps, actor, id, version: input.version, from: SETTLED_IN }, async (db, sheet) => {
    const cell = cellOf(sheet, input.key)
    const reading = await getReading(db, id, input.key)
    const value = settledValue(cell, reading, input)
    const changed = value !== reading.value
    if (input.how === 'corrected' && input.why === '') throw new UserError('invalid', `${cell.label}: say why the value changes.`)
    const origin: Origin = changed && input.how === 'corrected' ? 'person' : reading.origin
    await settleReading(db, {
      sheetId: id,
      key: input.key,
      value,
      origin,
      settlement: input.how,
      settledBy: actor.id,
      why: input.why || null,
    })
    const from = formatValue(cell, reading.value)
    const words = changed ? `${cell.label}: ${from} became ${formatValue(cell, value)}` : `${cell.label}: ${from}`
    const text = `${words}${input.how === 'kept' || changed ? '' : `, ${input.how}`}${input.why ? `, “${input.why}”` : ''}`
    return { trail: { action: input.how, key: input.key, text, details: { old: reading.value, new: value } } }
  })
  return getSheet(deps, actor, id)
}

function settledValue(cell: LayoutCell, reading: ReadingEntity, input: SettleReading): Value {
  if (input.how === 'kept') return reading.value
  if (input.how !== 'corrected') return null
  const value = input.value ?? null
  const problem = valueProblem(cell, value)
  if (problem) throw new UserError('invalid', problem, { issues: [{ path: input.key, message: problem }] })
  return value
}

export async function settleOneDoubt(deps: Deps, actor: User, id: string, input: SettleDoubt): Promise<Sheet> {
  await writeOnSheet({ deps, actor, id, version: input.version, from: SETTLED_IN }, async (db) => {
    const doubt = await findDoubt(db, id, input.doubtId)
    if (!doubt) throw new UserError('gone', 'This doubt does not stand any more: the readings it named have changed.')
    if (doubt.severity === 'stop' && input.why === '') throw new UserError('invalid', 'Say why this may stand: it stops results.')
    await settleDoubt(db, doubt.id, { settledBy: actor.id, why: input.why || null })
    const text = `let stand: ${doubt.text}${input.why ? ` “${input.why}”` : ''}`
    return { trail: { action: 'let stand', text, details: { rule: doubt.rule, cells: doubt.cells } } }
  })
  return getSheet(deps, actor, id)
}

export async function unsettle(
  deps: Deps,
  actor: User,
  id: string,
  input: { version: number; key?: string; doubtId?: string },
): Promise<Sheet> {
  await writeOnSheet({ deps, actor, id, version: input.version, from: SETTLED_IN }, async (db, sheet) => {
    if (input.doubtId) {
      const doubt = await findDoubt(db, id, input.doubtId)
      if (!doubt) throw new UserError('gone', 'This doubt does not stand any more: the readings it named have changed.')
      await settleDoubt(db, doubt.id, null)
      return {
        trail: { action: 'taken back', text: 'a doubt that was let stand is open again', details: { doubtId: input.doubtId } },
      }
    }
    const key = input.key ?? ''
    const cell = cellOf(sheet, key)
    const reading = await getReading(db, id, key)
    const origin = originOf(sheet, reading)
    await settleReading(db, { sheetId: id, key, value: reading.readValue, origin, settlement: null, settledBy: null, why: null })
    const text = `${cell.label}: taken back to ${formatValue(cell, reading.readValue)}`
    return { trail: { action: 'taken back', key, text, details: { old: reading.value, new: reading.readValue } } }
  })
  return getSheet(deps, actor, id)
}

/** Where a reading came from before a person changed it. */
function originOf(sheet: SheetEntity, reading: ReadingEntity): Origin {
  if (sheet.origin === 'keyed') return 'person'
  if (reading.pageId === null) return 'plan'
  return sheet.origin === 'spreadsheet' ? 'spreadsheet' : 'ink'
}

function cellOf(sheet: SheetEntity, key: string): LayoutCell {
  const layout = sheet.layoutKey ? findLayout(sheet.layoutKey, sheet.layoutVersion ?? undefined) : null
  const cell = layout?.cells.find((c) => c.key === key)
  if (!cell) throw new UserError('invalid', `This sheet has no cell ${key}.`)
  return cell
}

async function getReading(db: Db, sheetId: string, key: string): Promise<ReadingEntity> {
  const reading = await findReading(db, sheetId, key)
  if (!reading) throw new UserError('not_found', `This sheet has no reading ${key}.`)
  return reading
}

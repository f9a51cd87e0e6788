/** Enter: a settled sheet's readings become a record, with the results and the versions of the rules that made them. */
import { judgeSheet } from '../../../shared/checks/judge-sheet.ts'
import { RULES_VERSION } from '../../../shared/checks/run-checks.ts'
import { UserError } from '../../../shared/errors.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { Entered, Value } from '../../../shared/schemas/sheet.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { gearOf } from '../../../shared/trial/gear.ts'
import { FORMULA_VERSION } from '../../../shared/trial/result.ts'
import type { Db } from '../../db/database.ts'
import { namesOf } from '../../db/desk/sheet-detail.ts'
import { listSheetRows } from '../../db/desk/sheet-rows.ts'
import type { SheetEntity } from '../../db/entities/sheet.ts'
import { namedOnSheet } from '../../db/intake/sheet-facts.ts'
import { listDoubts, toDoubt } from '../../db/repositories/doubt.ts'
import { listReadings, toReading, valuesOf } from '../../db/repositories/reading.ts'
import { addRecord } from '../../db/repositories/record.ts'
import type { Deps } from '../../http/route.ts'
import { announceRecord } from '../webhooks/announce.ts'
import { writeOnSheet } from './change-sheet.ts'

const LEAST_ANSWER = 3

/** @throws UserError `conflict` while doubts are open, `invalid` for a challenged sheet without an `answer` to the challenge */
export async function enterSheet(deps: Deps, actor: User, id: string, version: number, answer = ''): Promise<Entered> {
  let entered = { number: 0, version: 0 }
  await writeOnSheet({ deps, actor, id, version, from: ['settled', 'challenged'] }, async (db, sheet) => {
    if (sheet.openDoubts > 0)
      throw new UserError('conflict', `${sheet.openDoubts} doubts are still open on this sheet: settle them first.`)
    const challenged = sheet.state === 'challenged'
    if (challenged && answer.length < LEAST_ANSWER)
      throw new UserError('invalid', 'This sheet was challenged: say in a line how that is answered. Nothing was entered.')
    entered = await makeRecord(db, sheet, actor)
    await announceRecord(deps, db, { type: entered.version === 1 ? 'record.entered' : 'record.changed', ...entered })
    const answered = challenged ? `; the challenge is answered: “${answer}”` : ''
    const text = `entered as record ${entered.number}, version ${entered.version}${answered}`
    return {
      sheet: { state: 'entered', enteredAt: new Date(), heldBy: null, heldSince: null, heldUntil: null },
      trail: { action: 'entered', text, details: { record: entered.number } },
    }
  })
  const { rows } = await listSheetRows(deps.source.manager, { desk: true })
  const next = rows.find((r) => r.id !== id && (r.inHand === null || r.inHand.userId === actor.id))
  return { recordNumber: entered.number, version: entered.version, next: next?.id ?? null }
}

async function makeRecord(db: Db, sheet: SheetEntity, actor: User): Promise<{ number: number; version: number }> {
  const layout = findLayout(sheet.layoutKey ?? '', sheet.layoutVersion ?? undefined)
  if (!layout) throw new UserError('conflict', 'This sheet has no layout yet: place it first.')
  const readings = await listReadings(db, sheet.id)
  const doubts = await listDoubts(db, sheet.id)
  const names = await namesOf(db, [...readings.map((r) => r.settledBy), ...doubts.map((d) => d.settledBy)])
  const values = valuesOf(readings)
  const named = await namedOnSheet(db, values)
  const { results } = judgeSheet(layout, values, sheet.facts)
  return addRecord(db, {
    sheetId: sheet.id,
    trialDate: text(values.trial_date),
    placeId: named.place?.id ?? null,
    demonstratorId: named.demonstrator?.id ?? sheet.ownerId,
    tractorId: named.tractor?.id ?? null,
    implementId: named.implement?.id ?? null,
    kitId: named.kit?.id ?? null,
    gear: gearOf(values),
    soilClass: text(values.soil_class),
    readings: readings.map((r) => toReading(r, names)),
    results: results as never,
    notes: doubts.map((d) => toDoubt(d, names)),
    facts: sheet.facts,
    rulesVersion: RULES_VERSION,
    formulaVersion: FORMULA_VERSION,
    enteredBy: actor.id,
  })
}

const text = (value: Value | undefined) => (typeof value === 'string' ? value : null)

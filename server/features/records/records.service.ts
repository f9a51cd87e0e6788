/** The trial book: look, filter, challenge. Nothing here changes a figure. */
import { UserError } from '../../../shared/errors.ts'
import type { ListRecords, TrialRecord } from '../../../shared/schemas/record.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { findRecordRow, listRecordRows, type RecordFilter } from '../../db/desk/record-rows.ts'
import { historyOf, listPages, namesOf } from '../../db/desk/sheet-detail.ts'
import { findPlannedRun } from '../../db/repositories/planned-run.ts'
import { challengeRecord, findRecord, listVersions } from '../../db/repositories/record.ts'
import { findSheet, noteOnSheet } from '../../db/repositories/sheet.ts'
import { addTrailLine } from '../../db/repositories/trail.ts'
import type { Deps } from '../../http/route.ts'
import { announceRecord } from '../webhooks/announce.ts'

const PAGE = 100

/** What this person may see of the book. */
export const visibleTo = (actor: User, filter: ListRecords): RecordFilter =>
  actor.role === 'demonstrator' ? { ...filter, demonstratorId: actor.id } : filter

export async function listRecords(deps: Deps, actor: User, filter: ListRecords) {
  const { rows, total } = await listRecordRows(deps.source.manager, visibleTo(actor, filter), PAGE + 1)
  const records = rows.slice(0, PAGE)
  return { records, total, next: rows.length > PAGE ? (records.at(-1)?.number ?? null) : null }
}

const missing = () => new UserError('not_found', 'There is no such record.')

export async function getRecord(deps: Deps, actor: User, number: number, version?: number): Promise<TrialRecord> {
  const db = deps.source.manager
  const record = await findRecord(db, number, version)
  const row = record && (await findRecordRow(db, number, record.version))
  const sheet = record && (await findSheet(db, record.sheetId))
  if (!record || !row || !sheet || (actor.role === 'demonstrator' && sheet.ownerId !== actor.id)) throw missing()
  const versions = await listVersions(db, number)
  const names = await namesOf(db, [record.challengedBy, ...versions.map((v) => v.enteredBy)])
  const challenged = record.challengedBy && record.challengedAt && record.challengeReason
  const run = await findPlannedRun(db, record.sheetId)
  return {
    ...row,
    run: run && { plot: run.plot, number: run.number },
    readings: record.readings,
    notes: record.notes,
    facts: record.facts,
    rulesVersion: record.rulesVersion,
    formulaVersion: record.formulaVersion,
    layout: sheet.layoutKey ?? '',
    layoutVersion: sheet.layoutVersion ?? 0,
    enteredBy: names.get(record.enteredBy) ?? '',
    enteredAt: record.enteredAt.toISOString(),
    challenge: challenged
      ? {
          by: names.get(record.challengedBy ?? '') ?? '',
          at: record.challengedAt?.toISOString() ?? '',
          reason: record.challengeReason ?? '',
        }
      : null,
    pages: await listPages(db, record.sheetId),
    history: await historyOf(db, record.sheetId),
    versions: versions.map((v) => ({
      version: v.version,
      enteredAt: v.enteredAt.toISOString(),
      enteredBy: names.get(v.enteredBy) ?? '',
    })),
  }
}

/** Opens the record's sheet at the desk again; the record stays in the book, marked as challenged. */
export async function challenge(deps: Deps, actor: User, number: number, reason: string): Promise<TrialRecord> {
  await deps.source.transaction(async (db) => {
    const record = await findRecord(db, number)
    if (!record) throw missing()
    if (!(await challengeRecord(db, number, record.version, actor.id, reason))) {
      throw new UserError('conflict', `Record ${number} is ${record.state} already.`)
    }
    await noteOnSheet(db, record.sheetId, {
      state: 'challenged',
      reason,
      version: (await findSheet(db, record.sheetId))!.version + 1,
    })
    await announceRecord(deps, db, { type: 'record.changed', number, version: record.version })
    const text = `record ${number} challenged: “${reason}”`
    await addTrailLine(db, {
      actor,
      action: 'challenged',
      subject: 'sheet',
      subjectId: record.sheetId,
      text,
      details: { record: number },
    })
  })
  return getRecord(deps, actor, number)
}

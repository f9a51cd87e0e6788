/** What the rules found on a sheet, and what people let stand. */
import { In } from 'typeorm'
import { fingerprintOf } from '../../../shared/checks/judge-sheet.ts'
import type { Finding } from '../../../shared/checks/rule.ts'
import type { Doubt } from '../../../shared/schemas/sheet.ts'
import type { Db } from '../database.ts'
import { DoubtEntity } from '../entities/reading.ts'

/** Standing doubts in the order the rules gave them. */
export const listDoubts = (db: Db, sheetId: string): Promise<DoubtEntity[]> =>
  db.find(DoubtEntity, { where: { sheetId, standing: true }, order: { position: 'ASC' } })

export const findDoubt = (db: Db, sheetId: string, id: string): Promise<DoubtEntity | null> =>
  db.findOne(DoubtEntity, { where: { id, sheetId, standing: true } })

/** Lets a doubt stand, or opens it again with null. */
export async function settleDoubt(db: Db, id: string, settled: { settledBy: string; why: string | null } | null): Promise<void> {
  await db.update(
    DoubtEntity,
    { id },
    settled ? { ...settled, settledAt: () => 'now()' } : { settledBy: null, settledAt: null, why: null },
  )
}

/** Brings the doubts in line with the findings: a doubt a person settled on the same numbers stays settled. */
export async function putFindings(db: Db, sheetId: string, findings: readonly Finding[]): Promise<void> {
  const rows = new Map(
    findings.map((f, position) => [
      fingerprintOf(f),
      {
        sheetId,
        fingerprint: fingerprintOf(f),
        rule: f.rule,
        ruleVersion: f.version,
        severity: f.severity,
        cells: f.cells,
        text: f.text,
        compared: f.compared,
        position,
        standing: true,
      },
    ]),
  )
  const known = await db.find(DoubtEntity, { where: { sheetId } })
  const gone = known.filter((d) => d.standing && !rows.has(d.fingerprint)).map((d) => d.id)
  if (gone.length > 0) await db.update(DoubtEntity, { id: In(gone) }, { standing: false })
  if (rows.size > 0) await db.upsert(DoubtEntity, [...rows.values()], ['sheetId', 'fingerprint'])
}

/** Notes are shown and wait for nobody. */
export const isOpenDoubt = (doubt: Pick<DoubtEntity, 'severity' | 'settledAt'>) =>
  doubt.severity !== 'note' && doubt.settledAt === null

export const toDoubt = (row: DoubtEntity, names: ReadonlyMap<string, string>): Doubt => ({
  id: row.id,
  rule: row.rule,
  ruleVersion: row.ruleVersion,
  severity: row.severity,
  cells: row.cells,
  text: row.text,
  compared: row.compared,
  settledBy: row.settledBy ? (names.get(row.settledBy) ?? null) : null,
  settledAt: row.settledAt?.toISOString() ?? null,
  why: row.why,
})

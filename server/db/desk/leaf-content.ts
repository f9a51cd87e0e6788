/** Everything a record's leaf says. */

import type { LeafContent } from '../../print/leaf-pdf.ts'
import type { Db } from '../database.ts'
import { findFarmer } from '../repositories/farmer.ts'
import { findPlannedRun } from '../repositories/planned-run.ts'
import { findRecord, listVersions } from '../repositories/record.ts'
import { findUser } from '../repositories/user.ts'
import { findRecordRow } from './record-rows.ts'

export interface Leaf {
  content: LeafContent
  sheetId: string
  /** The farmer as the plan names them; null for unplanned sheets, and once consent was withdrawn. */
  farmer: { name: string; email: string } | null
  /** The demonstration whose plan it is; null for unplanned sheets. */
  demonstrationId: string | null
  /** The farmer ticked on the sheet that they may be contacted. */
  mayBeContacted: boolean
}

/** null when there is no such record. Without a version: the newest. */
export async function findLeaf(db: Db, number: number, version?: number): Promise<Leaf | null> {
  const record = await findRecord(db, number, version)
  const row = record && (await findRecordRow(db, number, record.version))
  if (!record || !row) return null
  const run = await findPlannedRun(db, record.sheetId)
  const farmer = run?.farmerId ? await findFarmer(db, run.farmerId) : null
  const demonstrator = row.demonstrator.id ? await findUser(db, row.demonstrator.id) : null
  const versions = await listVersions(db, number)
  const newest = versions.at(-1)
  const consent = record.readings.find((r) => r.key === 'consent_contact')?.value
  return {
    sheetId: record.sheetId,
    farmer: farmer && { name: farmer.name, email: farmer.email ?? '' },
    demonstrationId: run?.demonstrationId ?? null,
    mayBeContacted: consent === 'yes',
    content: {
      row,
      run: run && { plot: run.plot, number: run.number },
      farmerName: farmer?.name ?? null,
      contact: { name: row.demonstrator.name, email: demonstrator?.email ?? null },
      enteredAt: record.enteredAt,
      versions: `rules ${record.rulesVersion}, formulas ${record.formulaVersion}`,
      superseded: newest && newest.version > record.version ? { version: newest.version, enteredAt: newest.enteredAt } : null,
      replaces: record.version > 1 ? record.version - 1 : null,
    },
  }
}

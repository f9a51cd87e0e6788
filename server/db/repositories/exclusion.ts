/** The log of runs left out of comparisons. */
import type { ExclusionLine } from '../../../shared/schemas/book-comparison.ts'
import type { Db } from '../database.ts'

interface NewLine {
  number: number
  act: ExclusionLine['act']
  reason: string
  byId: string
}

export async function addExclusionLine(db: Db, { number, act, reason, byId }: NewLine): Promise<void> {
  await db.query('INSERT INTO exclusions (record_number, act, reason, by_id) VALUES ($1, $2, $3, $4)', [
    number,
    act,
    reason,
    byId,
  ])
}

/** What was last done to a record; null where nobody left it out. Holds the record until the transaction ends: two people take turns. */
export async function lastExclusionAct(db: Db, number: number): Promise<ExclusionLine['act'] | null> {
  await db.query("SELECT pg_advisory_xact_lock(hashtextextended('exclusion' || $1, 0))", [String(number)])
  const [line] = await db.query<{ act: ExclusionLine['act'] }[]>(
    'SELECT act FROM exclusions WHERE record_number = $1 ORDER BY id DESC LIMIT 1',
    [number],
  )
  return line?.act ?? null
}

/** Newest first. */
export async function listExclusionLines(db: Db, limit: number): Promise<ExclusionLine[]> {
  const rows: Array<Omit<ExclusionLine, 'at'> & { at: Date }> = await db.query(
    `SELECT e.record_number AS number, e.act, e.reason, u.name AS by, e.at FROM exclusions e JOIN users u ON u.id = e.by_id
     ORDER BY e.id DESC LIMIT $1`,
    [limit],
  )
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }))
}

import type { ChangeList, ListChanges } from '../../../shared/schemas/change.ts'
import { listStandingRows } from '../../db/desk/record-rows.ts'
import { listChangesAfter } from '../../db/repositories/book-change.ts'
import type { Deps } from '../../http/route.ts'

/** What came after a position, each with the record as it stands now: keeping the newest of each makes a copy of the book. */
export async function listChanges({ source }: Deps, { after, limit }: ListChanges): Promise<ChangeList> {
  const db = source.manager
  const found = await listChangesAfter(db, after, limit + 1)
  const rows = found.slice(0, limit)
  const standing = await listStandingRows(db, [...new Set(rows.map((r) => r.number))])
  const byNumber = new Map(standing.map((record) => [record.number, record]))
  return {
    changes: rows.map((row) => ({ ...row, at: row.at.toISOString(), record: byNumber.get(row.number) ?? null })),
    next: rows.at(-1)?.position ?? after,
    more: found.length > limit,
  }
}

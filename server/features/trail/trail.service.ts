import type { z } from 'zod'
import type { trailListSchema } from '../../../shared/schemas/trail.ts'
import type { Db } from '../../db/database.ts'
import { listTrail } from '../../db/repositories/trail.ts'

/** Every change calls this in its own transaction: what is not in the trail did not happen, and the other way round. */
export { addTrailLine as writeTrail } from '../../db/repositories/trail.ts'

const PAGE = 100

/** The newest lines, or those before `after`'s id: the page that comes after it on the screen. */
export async function readTrail(db: Db, after: number | null): Promise<z.infer<typeof trailListSchema>> {
  const rows = await listTrail(db, { before: after, limit: PAGE + 1 })
  const entries = rows.slice(0, PAGE).map((row) => ({ ...row, at: row.at.toISOString() }))
  return { entries, next: rows.length > PAGE ? (entries.at(-1)?.id ?? null) : null }
}

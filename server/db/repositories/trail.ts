import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../database.ts'

/** Something that happened, to be kept for good. */
export interface TrailLine {
  /** Who did it; null where the product acts by itself (a reading, a job). */
  actor: Pick<User, 'id' | 'name'> | null
  /** A verb of the product: settle, enter, send back, invite, sign in. */
  action: string
  /** The noun it was done to: sheet, record, user, demonstration. */
  subject: string
  subjectId: string | null
  /** The reading it touched. */
  key?: string | null
  /** One plain sentence, with old and new value where there are two. */
  text: string
  details?: Record<string, unknown>
}

/** Adds a line; it stands or falls with the caller's transaction. */
export async function addTrailLine(db: Db, line: TrailLine): Promise<void> {
  const { actor, action, subject, subjectId, key = null, text, details = {} } = line
  await db.query(
    `INSERT INTO trail (actor_id, who, action, subject, subject_id, key, text, details) VALUES ($1, $2, $3, $4, $5, $6, $7, $8)`,
    [actor?.id ?? null, actor?.name ?? 'Sheafbook', action, subject, subjectId, key, text, JSON.stringify(details)],
  )
}

export interface TrailRow {
  id: number
  at: Date
  who: string
  action: string
  subject: string
  subjectId: string | null
  text: string
  sheetCode: string | null
}

/** Newest first; `before` is the id of the last line seen. */
export async function listTrail(db: Db, options: { before: number | null; limit: number }): Promise<TrailRow[]> {
  return db.query(
    `SELECT t.id, t.at, t.who, t.action, t.subject, t.subject_id AS "subjectId", t.text, s.code AS "sheetCode"
     FROM trail t LEFT JOIN sheets s ON t.subject = 'sheet' AND s.id = t.subject_id
     WHERE $1::bigint IS NULL OR t.id < $1 ORDER BY t.id DESC LIMIT $2`,
    [options.before, options.limit],
  )
}

/** Who last did something to it; null when nobody has. */
export async function findLastActor(db: Db, subjectId: string): Promise<string | null> {
  const [row] = await db.query<{ who: string }[]>('SELECT who FROM trail WHERE subject_id = $1 ORDER BY id DESC LIMIT 1', [
    subjectId,
  ])
  return row?.who ?? null
}

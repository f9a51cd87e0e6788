/** The audit trail: lines are added in the transaction of the change they tell of, and nothing can take one out. */
import type { Db } from '../database.ts'
import { TrailEntity } from '../entities/trail.ts'

export interface TrailLine {
  /** null: the reader or a rule, not a person. */
  actor: { id: string; name: string } | null
  action: string
  subject: string
  subjectId: string | null
  /** The cell, where it is about one. */
  key?: string | null
  text: string
  details?: Record<string, unknown>
}

export async function writeTrail(db: Db, line: TrailLine): Promise<void> {
  await db.query(
    'INSERT INTO trail (actor_id, who, action, subject, subject_id, key, text, details) VALUES ($1, $2, $3, $4, $5, $6, $7, $8)',
    [line.actor?.id ?? null, line.actor?.name ?? 'the reader', line.action, line.subject, line.subjectId, line.key ?? null, line.text, JSON.stringify(line.details ?? {})],
  )
}

/** Lines about one subject, oldest first. */
export const listTrailOf = (db: Db, subjectId: string): Promise<TrailEntity[]> =>
  db.find(TrailEntity, { where: { subjectId }, order: { id: 'ASC' } })

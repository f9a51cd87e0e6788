import type { Change } from '../../../shared/schemas/change.ts'
import type { Db } from '../database.ts'

type Row = Omit<Change, 'at' | 'record'> & { at: Date }

/** In the order in which they became visible; whoever has seen a position has missed none before it (see the trigger's words). */
export const listChangesAfter = (db: Db, after: number, limit: number): Promise<Row[]> =>
  db.query('SELECT position, what, number, version, at FROM book_changes WHERE position > $1 ORDER BY position LIMIT $2', [
    after,
    limit,
  ])

import type { Db } from '../database.ts'

/** Those of the keys that some row names: an upload, a page's picture, or the upright picture of a page that waits to be placed. */
export async function listNamedFiles(db: Db, keys: readonly string[]): Promise<Set<string>> {
  const rows: Array<{ key: string }> = await db.query(
    `SELECT storage_key AS key FROM uploads WHERE storage_key = ANY($1)
     UNION SELECT picture_key FROM pages WHERE picture_key = ANY($1)
     UNION SELECT 'uprights/' || id FROM pages WHERE 'uprights/' || id = ANY($1)`,
    [keys],
  )
  return new Set(rows.map(({ key }) => key))
}

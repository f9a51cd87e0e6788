/** What was read from each picture of a sheet, kept with its page: so that another picture can be weighed against all before it. */
import type { Db } from '../database.ts'
import type { PictureReadings } from '../intake/best-of-pictures.ts'
import type { ReadReading } from '../intake/page-outcome.ts'

interface Row {
  pageId: string
  fileName: string
  readings: Array<Omit<ReadReading, 'cellRef'>>
}

/** Oldest first; pages of spreadsheets, and pages read before readings were kept, are left out. */
export async function listPictureReadings(db: Db, sheetId: string): Promise<PictureReadings[]> {
  const rows: Row[] = await db.query(
    `SELECT p.id AS "pageId", u.file_name AS "fileName", p.reading->'readings' AS readings FROM pages p JOIN uploads u ON u.id = p.upload_id
     WHERE p.sheet_id = $1 AND p.state = 'read' AND p.block IS NULL AND p.reading ? 'readings' ORDER BY p.read_at, p.id`,
    [sheetId],
  )
  return rows.map(({ readings, ...page }) => ({ ...page, readings: readings.map((r) => ({ ...r, cellRef: null })) }))
}

/** What of a page's reading is kept with it: `planText` for the plan's check, `readings` for other pictures of the sheet. */
export const keptReading = (read: {
  origin: string
  planText?: string[]
  readings: readonly ReadReading[]
}): Record<string, unknown> => ({
  ...(read.planText ? { planText: read.planText } : {}),
  ...(read.origin === 'photo' ? { readings: read.readings.map(({ cellRef: _, ...reading }) => reading) } : {}),
})

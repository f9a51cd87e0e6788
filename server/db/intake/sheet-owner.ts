/** Whose sheet it is: of the demonstrator of its run, else of the one whose number is written on it, else of who sent it first. */
import type { Db } from '../database.ts'
import type { ReadingEntity } from '../entities/reading.ts'
import type { SheetEntity } from '../entities/sheet.ts'
import { isOpen } from '../repositories/reading.ts'
import { senderIdsOf } from '../repositories/sheet-people.ts'

/** A number in doubt gives a sheet to nobody: misread, it would show one demonstrator's sheet to another. */
export async function ownerOf(db: Db, sheet: SheetEntity, readings: readonly ReadingEntity[]): Promise<string | null> {
  const written = readings.find((r) => r.key === 'demonstrator_id' && !isOpen(r))?.value
  const rows: Array<{ id: string }> = await db.query(
    `SELECT d.demonstrator_id AS id, 1 AS place FROM runs r JOIN trials t ON t.id = r.trial_id
       JOIN demonstrations d ON d.id = t.demonstration_id WHERE r.id = $1
     UNION ALL SELECT id, 2 FROM users WHERE number = $2 AND role = 'demonstrator' ORDER BY place`,
    [sheet.runId, typeof written === 'number' ? Math.round(written) : null],
  )
  return rows[0]?.id ?? (await senderIdsOf(db, sheet.id)).at(-1) ?? sheet.ownerId
}

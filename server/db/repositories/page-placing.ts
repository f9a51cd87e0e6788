import type { Db } from '../database.ts'
import { PageEntity } from '../entities/upload.ts'

/** Notes on the sheet's newest page where a person placed it, and opens it for reading again; null when there is no page. */
export async function placePage(db: Db, sheetId: string, placed: NonNullable<PageEntity['placed']>): Promise<string | null> {
  const page = await db.findOne(PageEntity, { where: { sheetId }, order: { readAt: 'DESC' } })
  if (!page) return null
  await db.update(
    PageEntity,
    { id: page.id },
    { placed: placed as never, state: 'arrived', attempts: 0, attemptToken: null, takeAgain: null },
  )
  return page.id
}

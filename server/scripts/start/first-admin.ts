import { UserError } from '../../../shared/errors.ts'
import type { Settings } from '../../config.ts'

/** The address that makes the first admin, once, or null when there is an admin already. */
export async function firstAdminAddress(settings: Settings): Promise<string | null> {
  const { openDatabase } = await import('../../db/database.ts')
  const { createFirstAdminLink } = await import('../../features/users/first-admin.ts')
  const { linkUrl } = await import('../../features/users/links.ts')
  const source = await openDatabase(settings.databaseUrl, { poolSize: 1 })
  try {
    return linkUrl(settings.publicUrl, await createFirstAdminLink(source))
  } catch (cause) {
    if (cause instanceof UserError && cause.code === 'conflict') return null
    throw cause
  } finally {
    await source.destroy()
  }
}

import type { WebhookEvent } from '../../../shared/schemas/webhook.ts'
import type { Db } from '../../db/database.ts'
import { sendJobs } from '../../db/queue.ts'
import { addDeliveries } from '../../db/repositories/webhook-delivery.ts'
import type { Deps } from '../../http/route.ts'

/** Writes the messages and their jobs in the caller's transaction: told is what was kept, and all of it. */
export async function announceRecord(
  { boss, settings }: Pick<Deps, 'boss' | 'settings'>,
  db: Db,
  { type, number, version }: { type: WebhookEvent; number: number; version: number },
): Promise<void> {
  const url = `${settings.publicUrl}/api/records/${number}`
  const ids = await addDeliveries(db, { type, timestamp: new Date().toISOString(), data: { record: number, version, url } })
  const jobs = ids.map((deliveryId) => ({ deliveryId }))
  if (jobs.length > 0) await sendJobs(boss, db, 'webhook-send', jobs)
}

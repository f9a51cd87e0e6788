/** Messages to webhooks: written with what they tell of, and what became of each. */
import type { Delivery, WebhookEvent, WebhookPayload } from '../../../shared/schemas/webhook.ts'
import type { Db } from '../database.ts'

/** One message to every active webhook that wants it and whose owner may still read the book. Returns their ids. */
export async function addDeliveries(db: Db, payload: WebhookPayload): Promise<string[]> {
  const rows = await db.query<{ id: string }[]>(
    `INSERT INTO webhook_deliveries (id, webhook_id, event, payload)
     SELECT gen_random_uuid(), w.id, $1, $2 FROM webhooks w JOIN users u ON u.id = w.user_id
     WHERE w.state = 'active' AND $1 = ANY(w.events) AND u.active AND u.role IN ('analyst', 'admin') RETURNING id`,
    [payload.type satisfies WebhookEvent, JSON.stringify(payload)],
  )
  return rows.map(({ id }) => id)
}

interface DeliveryRow extends Omit<Delivery, 'createdAt' | 'lastAt'> {
  createdAt: Date
  lastAt: Date | null
}

/** The newest 50 of a webhook of this person; null when they have no such webhook. */
export async function listDeliveries(db: Db, userId: string, webhookId: string): Promise<Delivery[] | null> {
  const [own] = await db.query<unknown[]>('SELECT 1 FROM webhooks WHERE id = $1 AND user_id = $2', [webhookId, userId])
  if (!own) return null
  const rows = await db.query<DeliveryRow[]>(
    `SELECT id, event, state, attempts, status, trouble, created_at AS "createdAt", last_at AS "lastAt"
     FROM webhook_deliveries WHERE webhook_id = $1 ORDER BY created_at DESC, id LIMIT 50`,
    [webhookId],
  )
  return rows.map((row) => ({ ...row, createdAt: row.createdAt.toISOString(), lastAt: row.lastAt?.toISOString() ?? null }))
}

export interface WaitingDelivery {
  webhookId: string
  url: string
  secret: string
  payload: string
  paused: boolean
}

/** null when it was delivered, given up, or its webhook is gone. */
export async function findWaitingDelivery(db: Db, id: string): Promise<WaitingDelivery | null> {
  const [row] = await db.query<WaitingDelivery[]>(
    `SELECT w.id AS "webhookId", w.url, w.secret, d.payload, w.state = 'paused' AS paused
     FROM webhook_deliveries d JOIN webhooks w ON w.id = d.webhook_id WHERE d.id = $1 AND d.state = 'waiting'`,
    [id],
  )
  return row ?? null
}

export async function markDelivered(db: Db, id: string, status: number): Promise<void> {
  await db.query(
    `WITH done AS (
       UPDATE webhook_deliveries SET state = 'delivered', attempts = attempts + 1, status = $2, trouble = NULL, last_at = now()
       WHERE id = $1 AND state = 'waiting' RETURNING webhook_id)
     UPDATE webhooks SET last_delivered_at = now() FROM done WHERE id = done.webhook_id`,
    [id, status],
  )
}

/** An attempt that came to nothing; the message still waits. */
export async function noteDeliveryTrouble(db: Db, id: string, status: number | null, trouble: string): Promise<void> {
  await db.query(
    `UPDATE webhook_deliveries SET attempts = attempts + 1, status = $2, trouble = $3, last_at = now()
     WHERE id = $1 AND state = 'waiting'`,
    [id, status, trouble],
  )
}

export interface GivenUp {
  webhookId: string
  /** Another message got through since this one was written: the receiver is there, and only this one was refused. */
  othersArrive: boolean
}

/** null when it waits no more. `trouble` replaces what was noted last. */
export async function giveUpDelivery(db: Db, id: string, trouble: string | null): Promise<GivenUp | null> {
  const [rows] = await db.query<[GivenUp[], number]>(
    `UPDATE webhook_deliveries d SET state = 'failed', trouble = coalesce($2, d.trouble) FROM webhooks w
     WHERE d.id = $1 AND d.state = 'waiting' AND w.id = d.webhook_id
     RETURNING w.id AS "webhookId", coalesce(w.last_delivered_at > d.created_at, false) AS "othersArrive"`,
    [id, trouble],
  )
  return rows[0] ?? null
}

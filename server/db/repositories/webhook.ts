import type { Webhook, WebhookEvent } from '../../../shared/schemas/webhook.ts'
import type { Db } from '../database.ts'

interface Row extends Omit<Webhook, 'createdAt' | 'lastDeliveredAt'> {
  createdAt: Date
  lastDeliveredAt: Date | null
}

const COLUMNS = `id, url, events, state, paused_because AS "pausedBecause", created_at AS "createdAt",
  last_delivered_at AS "lastDeliveredAt"`

const toWebhook = (row: Row): Webhook => ({
  ...row,
  createdAt: row.createdAt.toISOString(),
  lastDeliveredAt: row.lastDeliveredAt?.toISOString() ?? null,
})

export interface NewWebhook {
  userId: string
  url: string
  events: readonly WebhookEvent[]
  secret: string
}

export async function addWebhook(db: Db, { userId, url, events, secret }: NewWebhook): Promise<Webhook> {
  const rows = await db.query<Row[]>(
    `INSERT INTO webhooks (user_id, url, events, secret) VALUES ($1, $2, $3, $4) RETURNING ${COLUMNS}`,
    [userId, url, events, secret],
  )
  return toWebhook(rows[0]!)
}

export async function listWebhooks(db: Db, userId: string): Promise<Webhook[]> {
  const rows = await db.query<Row[]>(`SELECT ${COLUMNS} FROM webhooks WHERE user_id = $1 ORDER BY created_at DESC, id`, [userId])
  return rows.map(toWebhook)
}

/** null when this person has no such webhook. */
export async function setWebhookState(db: Db, userId: string, id: string, state: Webhook['state']): Promise<Webhook | null> {
  const [rows] = await db.query<[Row[], number]>(
    `UPDATE webhooks SET state = $3, paused_because = NULL WHERE id = $1 AND user_id = $2 RETURNING ${COLUMNS}`,
    [id, userId, state],
  )
  return rows[0] ? toWebhook(rows[0]) : null
}

/** With its deliveries. null when this person has no such webhook. */
export async function removeWebhook(db: Db, userId: string, id: string): Promise<string | null> {
  const [rows] = await db.query<[{ url: string }[], number]>(
    'DELETE FROM webhooks WHERE id = $1 AND user_id = $2 RETURNING url',
    [id, userId],
  )
  return rows[0]?.url ?? null
}

/** Pauses it, unless it is paused already: then null. Otherwise whom to tell, and of which address. */
export async function pauseWebhook(db: Db, id: string, because: string): Promise<{ email: string; url: string } | null> {
  const [rows] = await db.query<[{ email: string; url: string }[], number]>(
    `UPDATE webhooks w SET state = 'paused', paused_because = $2 FROM users u
     WHERE w.id = $1 AND w.state = 'active' AND u.id = w.user_id RETURNING u.email, w.url`,
    [id, because],
  )
  return rows[0] ?? null
}

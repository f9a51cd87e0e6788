/** Mails on their way out. */
import type { Db } from '../database.ts'

export interface QueuedMail {
  id: string
  recipient: string
  subject: string
  body: string
}

/** null when it is gone, was sent, or was given up. */
export async function findQueuedMail(db: Db, id: string): Promise<QueuedMail | null> {
  const rows: QueuedMail[] = await db.query("SELECT id, recipient, subject, body FROM mails WHERE id = $1 AND state = 'queued'", [
    id,
  ])
  return rows[0] ?? null
}

export async function markMailSent(db: Db, id: string): Promise<void> {
  await db.query("UPDATE mails SET state = 'sent', sent_at = now(), error = NULL WHERE id = $1", [id])
}

/** Notes what went wrong; the mail still waits. */
export async function noteMailTrouble(db: Db, id: string, error: string): Promise<void> {
  await db.query("UPDATE mails SET error = $2 WHERE id = $1 AND state = 'queued'", [id, error])
}

/** Given up: the admin sees it in the outbox with what was noted last. */
export async function markMailFailed(db: Db, id: string, error: string | null): Promise<void> {
  await db.query("UPDATE mails SET state = 'failed', error = coalesce($2, error) WHERE id = $1 AND state = 'queued'", [id, error])
}

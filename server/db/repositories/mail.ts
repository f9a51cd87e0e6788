import type { Mail } from '../../../shared/schemas/mail.ts'
import type { Db } from '../database.ts'
import { MailEntity } from '../entities/mail.ts'

export interface NewMail {
  to: string
  subject: string
  text: string
}

/** A mail that waits to be sent. */
export async function addMail(db: Db, { to, subject, text }: NewMail): Promise<string> {
  const row = await db.save(
    db.create(MailEntity, { recipient: to, subject, body: text, state: 'queued', error: null, sentAt: null }),
  )
  return row.id
}

/** The newest 200. */
export async function listMails(db: Db): Promise<Mail[]> {
  const rows = await db.find(MailEntity, { order: { createdAt: 'DESC', id: 'ASC' }, take: 200 })
  return rows.map(toMail)
}

function toMail(row: MailEntity): Mail {
  return {
    id: row.id,
    to: row.recipient,
    subject: row.subject,
    text: row.body,
    state: row.state,
    createdAt: row.createdAt.toISOString(),
    sentAt: row.sentAt?.toISOString() ?? null,
    error: row.error,
  }
}

/** Leaves that went out by mail: one mail for a version of a record. */
import type { LeafStatus } from '../../../shared/schemas/leaf.ts'
import type { Db } from '../database.ts'

type Sent = LeafStatus['sent'][number]

/** Newest version first. */
export async function listLeaves(db: Db, number: number): Promise<Sent[]> {
  const rows: Array<Omit<Sent, 'at'> & { at: Date }> = await db.query(
    `SELECT l.record_version AS version, u.name AS by, m.created_at AS at, m.state, m.error
     FROM leaves l JOIN mails m ON m.id = l.mail_id JOIN users u ON u.id = l.sent_by
     WHERE l.record_number = $1 ORDER BY l.record_version DESC`,
    [number],
  )
  return rows.map(({ at, ...row }) => ({ ...row, at: at.toISOString() }))
}

export interface LeafMail {
  recordNumber: number
  recordVersion: number
  mailId: string
  sentBy: string
}

/** Notes the mail of a leaf. False when that version's leaf is out already; a mail that failed for good may be followed by another. */
export async function addLeaf(db: Db, { recordNumber, recordVersion, mailId, sentBy }: LeafMail): Promise<boolean> {
  const rows: unknown[] = await db.query(
    `INSERT INTO leaves (record_number, record_version, mail_id, sent_by) VALUES ($1, $2, $3, $4)
     ON CONFLICT (record_number, record_version) DO UPDATE SET mail_id = excluded.mail_id, sent_by = excluded.sent_by
       WHERE EXISTS (SELECT 1 FROM mails m WHERE m.id = leaves.mail_id AND m.state = 'failed')
     RETURNING 1`,
    [recordNumber, recordVersion, mailId, sentBy],
  )
  return rows.length === 1
}

/** Which record's leaf goes with this mail; null for any other mail. */
export async function findLeafOfMail(db: Db, mailId: string): Promise<{ number: number; version: number } | null> {
  const rows: Array<{ number: number; version: number }> = await db.query(
    'SELECT record_number AS number, record_version AS version FROM leaves WHERE mail_id = $1',
    [mailId],
  )
  return rows[0] ?? null
}

/** Takes the farmer's address out of the mails of a demonstration's leaves; what has not gone out does not. */
export async function eraseLeafMails(db: Db, demonstrationId: string): Promise<void> {
  await db.query(
    `UPDATE mails m SET recipient = 'erased', body = 'erased', state = CASE m.state WHEN 'queued' THEN 'failed' ELSE m.state END,
       error = CASE m.state WHEN 'queued' THEN 'Consent was withdrawn before it went out.' ELSE m.error END
     FROM leaves l JOIN records rec ON rec.number = l.record_number AND rec.version = l.record_version
       JOIN sheets s ON s.id = rec.sheet_id JOIN runs r ON r.id = s.run_id JOIN trials t ON t.id = r.trial_id
     WHERE l.mail_id = m.id AND t.demonstration_id = $1`,
    [demonstrationId],
  )
}

import type { Db } from '../../db/database.ts'
import { sendJob } from '../../db/queue.ts'
import { addMail, type NewMail } from '../../db/repositories/mail.ts'
import type { Deps } from '../../http/route.ts'

/** Writes the mail and its job in the caller's transaction: it goes out if, and only if, what it tells of was kept. */
export async function queueMail(deps: Pick<Deps, 'boss'>, db: Db, mail: NewMail): Promise<void> {
  const mailId = await addMail(db, mail)
  await sendJob(deps.boss, db, 'mail-send', { mailId })
}

/** Hands one mail to the mail server; a leaf is printed at that moment, so no copy of it lies anywhere. */
import type { DataSource, Db } from '../../server/db/database.ts'
import { findLeaf } from '../../server/db/desk/leaf-content.ts'
import { findLeafOfMail } from '../../server/db/repositories/leaf.ts'
import { findQueuedMail, markMailFailed, markMailSent, noteMailTrouble } from '../../server/db/repositories/mail-sending.ts'
import type { Mail, Mailer } from '../../server/mail/mailer.ts'
import { printLeaf } from '../../server/print/leaf-pdf.ts'
import { UserError } from '../../shared/errors.ts'
import { defineJob, type JobEnd, type JobHandler } from './job-handler.ts'

export interface MailSendDeps {
  source: DataSource
  mailer: Mailer
}

export function mailSendJob({ source, mailer }: MailSendDeps): JobHandler {
  return defineJob({
    name: 'mail-send',
    handle: async ({ mailId }): Promise<JobEnd> => {
      const mail = await findQueuedMail(source.manager, mailId)
      if (!mail) return 'done'
      const { recipient: to, subject, body: text } = mail
      try {
        // A worker that dies between handing over and noting it hands over twice; the same id lets mail programs show one.
        await mailer.send({ to, subject, text, messageId: `${mailId}@sheafbook`, ...(await enclosed(source.manager, mailId)) })
      } catch (cause) {
        if (cause instanceof UserError) {
          await markMailFailed(source.manager, mailId, cause.message)
          return 'done'
        }
        await noteMailTrouble(source.manager, mailId, (cause as Error).message)
        throw cause
      }
      await markMailSent(source.manager, mailId)
      return 'done'
    },
    giveUp: ({ mailId }) => markMailFailed(source.manager, mailId, null),
  })
}

/** @throws UserError when consent was withdrawn since the mail was written */
async function enclosed(db: Db, mailId: string): Promise<Pick<Mail, 'attachment'>> {
  const of = await findLeafOfMail(db, mailId)
  if (!of) return {}
  const leaf = await findLeaf(db, of.number, of.version)
  if (!leaf?.farmer) throw new UserError('conflict', 'Consent was withdrawn before it went out.')
  return { attachment: { filename: `leaf-${of.number}.pdf`, content: await printLeaf(leaf.content) } }
}

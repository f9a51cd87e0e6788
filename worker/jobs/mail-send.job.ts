/** Hands one mail to the mail server. */
import type { DataSource } from '../../server/db/database.ts'
import { findQueuedMail, markMailFailed, markMailSent, noteMailTrouble } from '../../server/db/repositories/mail-sending.ts'
import type { Mailer } from '../../server/mail/mailer.ts'
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
        await mailer.send({ to, subject, text, messageId: `${mailId}@sheafbook` })
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

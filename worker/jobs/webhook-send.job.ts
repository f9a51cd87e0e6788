/** Hands one message to a webhook; after days of failing the webhook is paused, and its owner told. */
import type PgBoss from 'pg-boss'
import type { DataSource, Db } from '../../server/db/database.ts'
import { sendJob } from '../../server/db/queue.ts'
import { addMail } from '../../server/db/repositories/mail.ts'
import { pauseWebhook } from '../../server/db/repositories/webhook.ts'
import {
  findWaitingDelivery,
  giveUpDelivery,
  markDelivered,
  noteDeliveryTrouble,
  type WaitingDelivery,
} from '../../server/db/repositories/webhook-delivery.ts'
import { TransientError } from '../../shared/errors.ts'
import { postSigned } from '../webhooks/post-signed.ts'
import { defineJob, type JobEnd, type JobHandler } from './job-handler.ts'

export interface WebhookSendDeps {
  source: DataSource
  boss: PgBoss
  /** Messages may go to addresses of a private network. */
  allowPrivate: boolean
}

/** The receiver says that it is gone for good (Standard Webhooks, on 410). */
const GONE = 410

export function webhookSendJob({ source, boss, allowPrivate }: WebhookSendDeps): JobHandler {
  /** @param always pauses the webhook even where other messages arrive */
  const giveUp = (id: string, because: string, always: boolean) =>
    source.transaction(async (db) => {
      const givenUp = await giveUpDelivery(db, id, null)
      if (givenUp && (always || !givenUp.othersArrive)) await pauseAndTell(boss, db, givenUp.webhookId, because)
    })

  async function attempt(id: string, delivery: WaitingDelivery, signal: AbortSignal): Promise<number> {
    try {
      return await postSigned({ id, ...delivery }, { allowPrivate, signal })
    } catch (cause) {
      const message = cause instanceof Error ? cause.message : String(cause)
      await noteDeliveryTrouble(source.manager, id, null, message)
      throw new TransientError(`The webhook could not be reached: ${message}`, { cause })
    }
  }

  return defineJob({
    name: 'webhook-send',
    handle: async ({ deliveryId }, { signal }): Promise<JobEnd> => {
      const delivery = await findWaitingDelivery(source.manager, deliveryId)
      if (!delivery) return 'done'
      if (delivery.paused) {
        await giveUpDelivery(source.manager, deliveryId, 'not sent: the webhook is paused')
        return 'done'
      }
      const status = await attempt(deliveryId, delivery, signal)
      if (status >= 200 && status < 300) {
        await markDelivered(source.manager, deliveryId, status)
        return 'done'
      }
      const trouble = status >= 300 && status < 400 ? `answered ${status}: a redirect is not followed` : `answered ${status}`
      await noteDeliveryTrouble(source.manager, deliveryId, status, trouble)
      if (status !== GONE) throw new TransientError(`The webhook ${trouble}`)
      await giveUp(deliveryId, 'its receiver says that it is gone (410)', true)
      return 'done'
    },
    giveUp: ({ deliveryId }) => giveUp(deliveryId, 'nothing could be delivered for days', false),
  })
}

async function pauseAndTell(boss: PgBoss, db: Db, webhookId: string, because: string): Promise<void> {
  const paused = await pauseWebhook(db, webhookId, because)
  if (!paused) return
  const text = `The webhook to ${paused.url} is paused: ${because}.\n\nNothing is lost: what happens meanwhile stands in the changes of the book (GET /api/changes). Take the webhook up again under Interface, Webhooks, when its receiver is back.\n`
  const mailId = await addMail(db, { to: paused.email, subject: 'A webhook is paused', text })
  await sendJob(boss, db, 'mail-send', { mailId })
}

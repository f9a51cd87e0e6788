/** Webhooks of a person. Their secret is shown once; what was sent stands in a log. */
import { randomBytes } from 'node:crypto'
import { UserError } from '../../../shared/errors.ts'
import type { User } from '../../../shared/schemas/user.ts'
import {
  type CreatedWebhook,
  type Delivery,
  type SaveWebhook,
  WEBHOOK_LIMITS,
  type Webhook,
} from '../../../shared/schemas/webhook.ts'
import { addTrailLine } from '../../db/repositories/trail.ts'
import { addWebhook, listWebhooks, removeWebhook, setWebhookState } from '../../db/repositories/webhook.ts'
import { listDeliveries } from '../../db/repositories/webhook-delivery.ts'
import type { Deps } from '../../http/route.ts'

const missing = () => new UserError('not_found', 'You have no such webhook.')

export const listOwnWebhooks = (deps: Deps, actor: User): Promise<Webhook[]> => listWebhooks(deps.source.manager, actor.id)

/** @throws UserError `invalid` for plain http, `conflict` when this person has as many as they may */
export async function createWebhook(deps: Deps, actor: User, { url, events }: SaveWebhook): Promise<CreatedWebhook> {
  if (!deps.settings.webhookAllowPrivate && !url.startsWith('https:')) {
    const message = 'The address must begin with https: what is sent could be read on its way. Nothing was saved.'
    throw new UserError('invalid', message, { issues: [{ path: 'url', message: 'must begin with https' }] })
  }
  const secret = `whsec_${randomBytes(32).toString('base64')}`
  return deps.source.transaction(async (db) => {
    if ((await listWebhooks(db, actor.id)).length >= WEBHOOK_LIMITS.a_person) {
      throw new UserError('conflict', `You have ${WEBHOOK_LIMITS.a_person} webhooks. Remove one first; none was made.`)
    }
    const saved = await addWebhook(db, { userId: actor.id, url, events: [...new Set(events)], secret })
    await trail(db, actor, saved.id, 'webhook made', `webhook to ${url} made for ${events.join(', ')}`)
    return { ...saved, secret }
  })
}

export async function changeWebhook(deps: Deps, actor: User, id: string, state: Webhook['state']): Promise<Webhook> {
  return deps.source.transaction(async (db) => {
    const saved = await setWebhookState(db, actor.id, id, state)
    if (!saved) throw missing()
    const act = state === 'paused' ? 'paused' : 'taken up again'
    await trail(db, actor, id, `webhook ${act}`, `webhook to ${saved.url} ${act}`)
    return saved
  })
}

export async function deleteWebhook(deps: Deps, actor: User, id: string): Promise<void> {
  await deps.source.transaction(async (db) => {
    const url = await removeWebhook(db, actor.id, id)
    if (url === null) throw missing()
    await trail(db, actor, id, 'webhook removed', `webhook to ${url} removed`)
  })
}

export async function listOwnDeliveries(deps: Deps, actor: User, id: string): Promise<Delivery[]> {
  const found = await listDeliveries(deps.source.manager, actor.id, id)
  if (!found) throw missing()
  return found
}

const trail = (db: Parameters<typeof addTrailLine>[0], actor: User, subjectId: string, action: string, text: string) =>
  addTrailLine(db, { actor, action, subject: 'webhook', subjectId, text })

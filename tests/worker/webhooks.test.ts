/** Messages on their way to a real receiver on this machine, checked by the specification's own library. */
import { randomBytes } from 'node:crypto'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { Webhook } from 'standardwebhooks'
import { afterAll, beforeAll, beforeEach, expect, it } from 'vitest'
import { addWebhook, setWebhookState } from '../../server/db/repositories/webhook.ts'
import { listDeliveries } from '../../server/db/repositories/webhook-delivery.ts'
import { announceRecord } from '../../server/features/webhooks/announce.ts'
import { type Delivery, webhookPayloadSchema } from '../../shared/schemas/webhook.ts'
import { webhookSendJob } from '../../worker/jobs/webhook-send.job.ts'
import { postSigned } from '../../worker/webhooks/post-signed.ts'
import { createUser } from '../builders/user.ts'
import { waitFor } from '../support/wait-for.ts'
import { createSetting, noneOf, type Setting } from './setting.ts'

interface Received {
  path: string
  headers: Record<string, string>
  body: string
}

let setting: Setting
let receiver: Server
let base: string
let received: Received[] = []
/** Statuses to answer with, in order; 204 after them. */
let answers: number[] = []
let owner: { id: string; email: string }

beforeAll(async () => {
  setting = await createSetting()
  owner = await createUser(setting.source.manager, { role: 'analyst' })
  receiver = createServer((req, res) => {
    let body = ''
    req.on('data', (piece: Buffer) => {
      body += piece.toString()
    })
    req.on('end', () => {
      received.push({ path: req.url ?? '', headers: req.headers as Record<string, string>, body })
      res.writeHead(answers.shift() ?? 204, { Location: '/elsewhere' }).end()
    })
  })
  await new Promise<void>((resolve) => receiver.listen(0, '127.0.0.1', resolve))
  base = `http://127.0.0.1:${(receiver.address() as AddressInfo).port}`
  // In earnest the attempts take days.
  await setting.source.query(
    "UPDATE pgboss.queue SET retry_delay = 0, retry_backoff = false, retry_limit = 2 WHERE name = 'webhook-send'",
  )
  await setting.start((source, boss) => [
    ...noneOf('upload-split', 'page-read'),
    { name: 'mail-send', handle: async () => 'done', giveUp: async () => undefined },
    webhookSendJob({ source, boss, allowPrivate: true }),
  ])
})
beforeEach(async () => {
  received = []
  answers = []
  await setting.source.query('DELETE FROM webhooks')
})
afterAll(async () => {
  await setting.close()
  receiver.closeAllConnections()
  await new Promise((resolve) => receiver.close(resolve))
})

async function createHook(url = `${base}/hook`) {
  const secret = `whsec_${randomBytes(32).toString('base64')}`
  const { manager } = setting.source
  const { id } = await addWebhook(manager, { userId: owner.id, url, events: ['record.entered'], secret })
  const log = async () => (await listDeliveries(manager, owner.id, id)) ?? []
  return {
    id,
    secret,
    log,
    waitForState: (state: Delivery['state']) =>
      waitFor(async () => (await log()).every((d) => d.state === state), {
        what: `the message to be ${state}`,
        deadline_ms: 30_000,
      }),
  }
}

const announce = (number = 231) =>
  setting.source.transaction((db) =>
    announceRecord({ boss: setting.boss, settings: { publicUrl: 'https://sheaf.example' } as never }, db, {
      type: 'record.entered',
      number,
      version: 1,
    }),
  )
const stateOf = async (id: string) =>
  (await setting.source.query('SELECT state, paused_because AS because FROM webhooks WHERE id = $1', [id]))[0]
const mailsTo = (email: string): Promise<{ subject: string; body: string }[]> =>
  setting.source.query('SELECT subject, body FROM mails WHERE recipient = $1', [email])

it('a message arrives signed, and says what was entered', async () => {
  const hook = await createHook()
  await announce()
  await hook.waitForState('delivered')
  const [message] = received
  expect(received).toHaveLength(1)
  // standardwebhooks 1.1.1, the specification's library: throws when the signature does not fit.
  expect(webhookPayloadSchema.parse(new Webhook(hook.secret).verify(message!.body, message!.headers))).toMatchObject({
    type: 'record.entered',
    data: { record: 231, version: 1, url: 'https://sheaf.example/api/records/231' },
  })
  expect(await hook.log()).toMatchObject([{ id: message?.headers['webhook-id'], attempts: 1, status: 204, trouble: null }])
})

it('a message that is refused is sent again with the same id and the same content', async () => {
  const hook = await createHook()
  answers = [500, 503]
  await announce()
  await hook.waitForState('delivered')
  expect(received).toHaveLength(3)
  expect(new Set(received.map((m) => m.headers['webhook-id'])).size).toBe(1)
  expect(new Set(received.map((m) => m.body)).size).toBe(1)
  for (const message of received) new Webhook(hook.secret).verify(message.body, message.headers)
  expect(await hook.log()).toMatchObject([{ attempts: 3, status: 204 }])
})

it('a redirect is not followed', async () => {
  const hook = await createHook()
  answers = [302, 307, 301]
  await announce()
  await hook.waitForState('failed')
  expect(new Set(received.map((m) => m.path))).toEqual(new Set(['/hook']))
  expect((await hook.log())[0]?.trouble).toContain('a redirect is not followed')
})

it('when every attempt failed the webhook is paused, its owner is told by mail, and nothing more is sent', async () => {
  const hook = await createHook()
  answers = Array.from({ length: 3 }, () => 500)
  await announce()
  await hook.waitForState('failed')
  await waitFor(async () => (await stateOf(hook.id)).state === 'paused', { what: 'the webhook to be paused' })
  expect((await mailsTo(owner.email)).at(-1)?.body).toContain(`${base}/hook is paused`)
  await announce(232)
  expect(await hook.log()).toHaveLength(1)
  await setWebhookState(setting.source.manager, owner.id, hook.id, 'active')
  await announce(233)
  await waitFor(async () => (await hook.log()).some((d) => d.state === 'delivered'), { what: 'the next message to arrive' })
})

it('one message that is refused for ever does not pause a webhook that takes the others', async () => {
  const hook = await createHook()
  answers = [500, 500, 500]
  await announce(240)
  await waitFor(() => received.length > 0, { what: 'the first attempt' })
  // Another message got through meanwhile.
  await setting.source.query("UPDATE webhooks SET last_delivered_at = now() + interval '1 minute' WHERE id = $1", [hook.id])
  await hook.waitForState('failed')
  expect(await stateOf(hook.id)).toMatchObject({ state: 'active' })
})

it('a receiver that says it is gone is believed at once', async () => {
  const hook = await createHook()
  answers = [410]
  await announce()
  await hook.waitForState('failed')
  expect(received).toHaveLength(1)
  expect(await stateOf(hook.id)).toEqual({ state: 'paused', because: 'its receiver says that it is gone (410)' })
})

it('what was rolled back is not told', async () => {
  const hook = await createHook()
  const undone = setting.source.transaction(async (db) => {
    await announceRecord({ boss: setting.boss, settings: { publicUrl: 'https://sheaf.example' } as never }, db, {
      type: 'record.entered',
      number: 250,
      version: 1,
    })
    throw new Error('undone')
  })
  await expect(undone).rejects.toThrow('undone')
  expect(await hook.log()).toEqual([])
  const [{ n }] = await setting.source.query(
    "SELECT count(*)::int AS n FROM pgboss.job WHERE name = 'webhook-send' AND state < 'completed'",
  )
  expect(n).toBe(0)
})

it('somebody who may not read the book any more is told nothing', async () => {
  const hook = await createHook()
  await setting.source.query('UPDATE users SET active = false WHERE id = $1', [owner.id])
  await announce()
  await setting.source.query('UPDATE users SET active = true WHERE id = $1', [owner.id])
  expect(await hook.log()).toEqual([])
})

it.each(['127.0.0.1', 'localhost', '[::1]', '[::ffff:127.0.0.1]'])(
  'nothing is sent to %s unless the settings allow it',
  async (host) => {
    const url = `http://${host}:${(receiver.address() as AddressInfo).port}/hook`
    const message = { id: 'm1', url, secret: 'whsec_c2VjcmV0', payload: '{}' }
    await expect(postSigned(message, { allowPrivate: false, signal: new AbortController().signal })).rejects.toThrow(
      'private network',
    )
    expect(received).toEqual([])
  },
)

import { afterAll, beforeAll, expect, test } from 'vitest'
import { type CreatedWebhook, type Delivery, WEBHOOK_LIMITS, type Webhook } from '../../shared/schemas/webhook.ts'
import { createRecord } from '../builders/record.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let analyst: TestAgent

beforeAll(async () => {
  server = await startTestServer()
  await createGoldenRegisters(server.deps.source)
  analyst = await server.signIn('analyst')
})
afterAll(() => server.close())

const HOOK = { url: 'https://data.example/sheafbook', events: ['record.entered', 'record.changed'] }
const make = async (maker = analyst, changes = {}) =>
  (await maker.post('/webhooks', { ...HOOK, ...changes })).body as CreatedWebhook
const log = async (id: string) => (await analyst.get(`/webhooks/${id}/deliveries`)).body as Delivery[]

test('the secret is shown once', async () => {
  const { id, secret } = await make()
  expect(secret).toMatch(/^whsec_[A-Za-z0-9+/]{43}=$/)
  const listed = (await analyst.get('/webhooks')).body as Webhook[]
  expect(listed.find((hook) => hook.id === id)).not.toHaveProperty('secret')
  const trail = JSON.stringify(await server.deps.source.query('SELECT * FROM trail'))
  expect(trail).not.toContain(secret)
})

test('entering and challenging write a message with its job, for those who asked for it', async () => {
  const both = await make()
  const entered = await make(analyst, { events: ['record.entered'] })
  const clerk = await server.signIn('clerk')
  const { user } = await server.signIn('demonstrator')
  const { recordNumber } = await createRecord(server, clerk, user)
  await analyst.post(`/records/${recordNumber}/challenge`, { reason: 'speed cannot be' })
  expect((await log(both.id)).map((d) => d.event)).toEqual(['record.changed', 'record.entered'])
  expect((await log(entered.id)).map((d) => [d.event, d.state, d.attempts])).toEqual([['record.entered', 'waiting', 0]])
  const jobs: { id: string }[] = await server.deps.source.query(
    "SELECT data->>'deliveryId' AS id FROM pgboss.job WHERE name = 'webhook-send'",
  )
  for (const delivery of await log(both.id)) expect(jobs.map((j) => j.id)).toContain(delivery.id)
})

test('an address in clear is refused unless the book runs inside a private network', async () => {
  const refused = await analyst.post('/webhooks', { ...HOOK, url: 'http://data.example/sheafbook' })
  expect(refused.status).toBe(400)
  expect(JSON.stringify(refused.body)).toContain('https')
  const inside = await startTestServer({ WEBHOOK_ALLOW_PRIVATE: 'true' })
  try {
    expect((await (await inside.signIn('analyst')).post('/webhooks', { ...HOOK, url: 'http://10.0.0.5/hook' })).status).toBe(201)
  } finally {
    await inside.close()
  }
})

test('a webhook is paused, taken up again and removed by its owner alone', async () => {
  const { id } = await make()
  const other = await server.signIn('analyst')
  expect((await other.patch(`/webhooks/${id}`, { state: 'paused' })).status).toBe(404)
  expect((await other.delete(`/webhooks/${id}`)).status).toBe(404)
  expect((await other.get(`/webhooks/${id}/deliveries`)).status).toBe(404)
  expect((await analyst.patch(`/webhooks/${id}`, { state: 'paused' })).body).toMatchObject({ state: 'paused' })
  expect((await analyst.patch(`/webhooks/${id}`, { state: 'active' })).body).toMatchObject({
    state: 'active',
    pausedBecause: null,
  })
  expect((await analyst.delete(`/webhooks/${id}`)).status).toBe(204)
  const lines: { action: string }[] = await server.deps.source.query(
    'SELECT action FROM trail WHERE subject_id = $1 ORDER BY id',
    [id],
  )
  expect(lines.map((l) => l.action)).toEqual(['webhook made', 'webhook paused', 'webhook taken up again', 'webhook removed'])
})

test('nobody makes more than they may', async () => {
  const keen = await server.signIn('analyst')
  for (let n = 0; n < WEBHOOK_LIMITS.a_person; n += 1) await make(keen)
  expect((await keen.post('/webhooks', HOOK)).status).toBe(409)
})

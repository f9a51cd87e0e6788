import { afterAll, beforeAll, expect, test } from 'vitest'
import { type ApiToken, type CreatedToken, SCOPES, type Scope, TOKEN_LIMITS } from '../../shared/schemas/token.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let analyst: Awaited<ReturnType<TestServer['signIn']>>

beforeAll(async () => {
  server = await startTestServer()
  analyst = await server.signIn('analyst')
})
afterAll(() => server.close())

const make = async (maker: TestAgent = analyst, scopes: readonly Scope[] = SCOPES) =>
  (await maker.post('/tokens', { name: 'nightly copy', scopes, days: 30 })).body as CreatedToken
const call = (path: string, token: string) =>
  server.anonymous().request('GET', path, { headers: { Authorization: `Bearer ${token}` } })
const listed = async (id: string) => ((await analyst.get('/tokens')).body as ApiToken[]).find((t) => t.id === id)

test('a token is shown once, and only its hash is kept', async () => {
  const { token, id } = await make()
  expect(token).toMatch(/^sheafbook_[\w-]{43}$/)
  expect(await listed(id)).not.toHaveProperty('token')
  const rows = JSON.stringify(await server.deps.source.query('SELECT * FROM api_tokens'))
  const trail = JSON.stringify(await server.deps.source.query('SELECT * FROM trail'))
  expect(rows + trail).not.toContain(token.slice(0, -4))
  expect((await call('/records', token)).status).toBe(200)
})

test('its last use is shown', async () => {
  const { token, id } = await make()
  expect((await listed(id))?.lastUsedAt).toBeNull()
  await call('/records', token)
  expect((await listed(id))?.lastUsedAt).not.toBeNull()
})

test('a token that was revoked, has run out or was never made is refused, and says how to come in', async () => {
  const revoked = await make()
  await analyst.post(`/tokens/${revoked.id}/revoke`)
  const late = await make()
  await server.deps.source.query("UPDATE api_tokens SET expires_at = now() - interval '1 second' WHERE id = $1", [late.id])
  for (const token of [revoked.token, late.token, 'sheafbook_never-made', '']) {
    const answer = await call('/records', token)
    expect(answer.status).toBe(401)
    expect(answer.headers.get('www-authenticate')).toContain('Bearer')
  }
})

test('a token of somebody disabled is worth nothing from the next call on', async () => {
  const leaving = await server.signIn('analyst')
  const { token } = await make(leaving)
  expect((await call('/records', token)).status).toBe(200)
  await server.deps.source.query('UPDATE users SET active = false WHERE id = $1', [leaving.user.id])
  expect((await call('/records', token)).status).toBe(401)
})

test('a session does not widen a token, and a token opens no session', async () => {
  const { token } = await make(analyst, ['changes'])
  const both = await analyst.request('GET', '/records', { headers: { Authorization: `Bearer ${token}` } })
  expect(both.status).toBe(403)
  const answer = await call('/changes', token)
  expect(answer.status).toBe(200)
  expect(answer.headers.getSetCookie()).toEqual([])
})

test('another person’s tokens are not there', async () => {
  const { id } = await make()
  const other = await server.signIn('analyst')
  expect((await other.get('/tokens')).body).toEqual([])
  expect((await other.post(`/tokens/${id}/revoke`)).status).toBe(404)
})

test('somebody who calls too often is told to wait', async () => {
  const { token, id } = await make()
  await call('/records', token)
  // Counting up to the limit by calls would take long: the counter is set where those calls would have left it.
  await server.deps.source.query("UPDATE rate_limits SET points = $1 WHERE key LIKE 'token:%'", [TOKEN_LIMITS.calls_per_min])
  const answer = await call('/records', token)
  expect(answer.status).toBe(429)
  expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0)
  expect((await listed(id))?.revokedAt).toBeNull()
})

test('nobody makes more than they may, and making and revoking stand in the trail', async () => {
  const keen = await server.signIn('analyst')
  for (let n = 0; n < TOKEN_LIMITS.a_person; n += 1) await make(keen)
  const refused = await keen.post('/tokens', { name: 'one more', scopes: ['book'], days: 1 })
  expect(refused.status).toBe(409)
  const [first] = (await keen.get('/tokens')).body as ApiToken[]
  await keen.post(`/tokens/${first?.id}/revoke`)
  expect((await keen.post('/tokens', { name: 'one more', scopes: ['book'], days: 1 })).status).toBe(201)
  const lines: { action: string }[] = await server.deps.source.query(
    'SELECT action FROM trail WHERE subject_id = $1 ORDER BY id',
    [first?.id],
  )
  expect(lines.map((l) => l.action)).toEqual(['token made', 'token revoked'])
})

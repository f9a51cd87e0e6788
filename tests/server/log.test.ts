import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { withClient } from '../../server/postgres/roles.ts'
import { createUser } from '../builders/user.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

describe('the log', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer({ LOG_LEVEL: 'trace' })
  })
  afterAll(() => server.close())

  it('has a line a request, and no password, token, cookie, name or filter in it', async () => {
    const canary = 'canary-of-the-log-test'
    const user = await createUser(server.deps.source.manager, { name: `Name ${canary}` })
    const agent = server.anonymous()
    await agent.signIn(user.email, `password ${canary}`)
    await agent.signIn(user.email)
    await agent.get(`/links/token-${canary}`)
    await agent.get(`/demonstrations?after=${canary}`)
    await agent.post('/password/set', { token: `token-${canary}-longer`, password: `password ${canary}` })
    await agent.request('GET', '/session', { headers: { Authorization: canary, Referer: canary } })
    const all = server.logged.join('\n')
    expect(server.logged.filter((line) => line.includes('/api/links/…'))).toHaveLength(1)
    expect(all).not.toContain(canary)
    expect(all).not.toContain(decodeURIComponent(/sheafbook=([^;]+)/.exec(agent.cookie)?.[1] ?? 'no cookie').slice(2, 30))
  })

  it('tells a failure of the database without the values it failed on', async () => {
    const canary = 'canary-of-the-values'
    const admin = await server.signIn('admin')
    const owner = (sql: string) => withClient(server.database.ownerUrl, (client) => client.query(sql))
    server.logged.length = 0
    await owner('ALTER TABLE places RENAME COLUMN district TO elsewhere')
    const answer = await admin.post('/registers/places', { number: 1, name: canary, district: canary })
    await owner('ALTER TABLE places RENAME COLUMN elsewhere TO district')
    expect(answer.status).toBe(500)
    const all = server.logged.join('\n')
    expect(all).toContain('"level":50')
    expect(all).not.toContain(canary)
  })
})

import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { changeUser } from '../../server/db/repositories/user.ts'
import { createUser } from '../builders/user.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

describe('a session', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
  })
  afterAll(() => server.close())

  it('opens with the right address and password, and says who is signed in', async () => {
    const agent = await server.signIn('clerk')
    expect(await agent.get('/session')).toMatchObject({ status: 200, body: { user: { email: agent.user.email, role: 'clerk' } } })
  })

  it('is not there for somebody who did not sign in', async () => {
    const answer = await server.anonymous().get('/session')
    expect(answer).toMatchObject({ status: 401, body: { error: { code: 'not_signed_in' } } })
  })

  it('does not say whether the address or the password was wrong', async () => {
    const user = await createUser(server.deps.source.manager)
    const wrong = await server.anonymous().signIn(user.email, 'not the password at all')
    const unknown = await server.anonymous().signIn('nobody@fields.example', 'not the password at all')
    const told = ({ body }: { body: unknown }) => (body as { error: { message: string } }).error.message
    expect([wrong.status, told(wrong)]).toEqual([unknown.status, told(unknown)])
    expect(wrong.status).toBe(401)
  })

  it('gets a new id at sign-in, and the table holds only its hash', async () => {
    const agent = await server.signIn('analyst')
    const first = agent.cookie
    await agent.signIn(agent.user.email)
    expect(agent.cookie).not.toBe(first)
    const sid = decodeURIComponent(agent.cookie.split('=')[1] ?? '')
      .slice(2)
      .split('.')[0]
    const rows: { sid: string }[] = await server.deps.source.query('SELECT sid FROM session')
    expect(rows.length).toBeGreaterThan(0)
    expect(rows.map((row) => row.sid)).not.toContain(sid)
  })

  it('ends at sign-out', async () => {
    const agent = await server.signIn('admin')
    const { cookie } = agent
    expect((await agent.delete('/session')).status).toBe(204)
    agent.cookie = cookie
    expect((await agent.get('/session')).status).toBe(401)
  })

  it('is worth nothing from the request after its person is disabled', async () => {
    const agent = await server.signIn('clerk')
    await changeUser(server.deps.source.manager, agent.user.id, { active: false })
    expect((await agent.get('/session')).status).toBe(401)
  })

  it('is refused after five failures within a minute, with the time to wait', async () => {
    const user = await createUser(server.deps.source.manager)
    const agent = server.anonymous()
    for (let i = 0; i < 5; i++) expect((await agent.signIn(user.email, 'a wrong password')).status).toBe(401)
    const sixth = await agent.signIn(user.email)
    expect(sixth.status).toBe(429)
    expect(Number(sixth.headers.get('retry-after'))).toBeGreaterThan(0)
  })

  it('that goes well does not count as a failure', async () => {
    const user = await createUser(server.deps.source.manager)
    for (let i = 0; i < 7; i++) expect((await server.anonymous().signIn(user.email)).status).toBe(200)
  })
})

import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { changeUser } from '../../server/db/repositories/user.ts'
import { hashPassword } from '../../server/features/session/password.ts'
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

  it('can be opened by its owner while a stranger guesses: a browser that is known is counted apart', async () => {
    const user = await createUser(server.deps.source.manager)
    const owner = server.anonymous()
    await owner.signIn(user.email)
    await owner.delete('/session')
    for (let i = 0; i < 6; i++) await server.anonymous().signIn(user.email, 'a guess that is wrong')
    expect((await server.anonymous().signIn(user.email)).status).toBe(429)
    expect((await owner.signIn(user.email)).status).toBe(200)
    // The mark is no way round the limit, nor good for another account.
    const other = await createUser(server.deps.source.manager)
    for (let i = 0; i < 5; i++) await owner.signIn(user.email, 'a guess that is wrong')
    expect((await owner.signIn(user.email)).status).toBe(429)
    for (let i = 0; i < 5; i++) await owner.signIn(other.email, 'a guess that is wrong')
    expect((await server.anonymous().signIn(other.email)).status).toBe(429)
  })

  it.each([
    ['admin', 30 * 60],
    ['clerk', 8 * 3600],
    ['analyst', 8 * 3600],
    ['demonstrator', 30 * 24 * 3600],
  ] as const)('of a %s lives %i s unused, and every request renews it', async (role, idle_s) => {
    const agent = await server.signIn(role)
    const { headers } = await agent.get('/session')
    const cookie = headers.getSetCookie().find((line) => line.startsWith('sheafbook=')) ?? ''
    const ends = Date.parse(/Expires=([^;]+)/.exec(cookie)?.[1] ?? '')
    expect(Math.abs(ends - Date.now() - idle_s * 1000)).toBeLessThan(60_000)
    const [row]: { left_s: number }[] = await server.deps.source.query(
      `SELECT extract(epoch FROM expire - now())::float8 AS left_s FROM session WHERE sess -> 'passport' ->> 'user' = $1`,
      [agent.user.id],
    )
    expect(Math.abs((row?.left_s ?? 0) - idle_s)).toBeLessThan(60)
  })

  it('costs as much to refuse for an unknown address as for a wrong password', async () => {
    const user = await createUser(server.deps.source.manager, { passwordHash: await hashPassword('as dear as a real one is') })
    const refuse = async (email: string) => {
      await server.deps.source.query('DELETE FROM rate_limits')
      // Processor time and not the clock: other work on the machine does not count.
      const before = process.cpuUsage()
      expect((await server.anonymous().signIn(email, 'not the password')).status).toBe(401)
      const { user: spent_us, system: system_us } = process.cpuUsage(before)
      return spent_us + system_us
    }
    await refuse('first@fields.example')
    const known: number[] = []
    const unknown: number[] = []
    for (let i = 0; i < 10; i++) {
      known.push(await refuse(user.email))
      unknown.push(await refuse(`nobody-${i}@fields.example`))
    }
    const ratio = Math.min(...unknown) / Math.min(...known)
    // The aim is 10 %; the rest is what a test on a shared machine needs. Without the hash it would be far below.
    expect(ratio).toBeGreaterThan(0.7)
    expect(ratio).toBeLessThan(1.4)
  })

  it('that goes well does not count as a failure', async () => {
    const user = await createUser(server.deps.source.manager)
    for (let i = 0; i < 7; i++) expect((await server.anonymous().signIn(user.email)).status).toBe(200)
  })
})

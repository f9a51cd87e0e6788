import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { nextUserNumber } from '../../server/db/repositories/user.ts'
import { createFirstAdminLink } from '../../server/features/users/first-admin.ts'
import type { Mail } from '../../shared/schemas/mail.ts'
import type { User } from '../../shared/schemas/user.ts'
import { createUser, TEST_PASSWORD } from '../builders/user.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { waitFor } from '../support/wait-for.ts'

const SENTENCE = 'the third furrow was the straight one'

describe('people', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
  })
  afterAll(() => server.close())

  const lastMailTo = async (email: string): Promise<Mail> => {
    const admin = await server.signIn('admin')
    return waitFor(async () => ((await admin.get('/mails')).body as Mail[]).find((mail) => mail.to === email), {
      what: `a mail to ${email}`,
    })
  }
  const freeNumber = () => nextUserNumber(server.deps.source.manager)
  const tokenOf = (mail: Mail) => /\/link\/([\w-]+)/.exec(mail.text)?.[1] ?? ''

  it('are invited by mail, set their password once and are signed in', async () => {
    const admin = await server.signIn('admin')
    const invited = await admin.post('/users', {
      number: await freeNumber(),
      name: 'Odra Veltin',
      email: 'Odra@Fields.example',
      role: 'clerk',
    })
    expect(invited).toMatchObject({ status: 201, body: { email: 'odra@fields.example', role: 'clerk', hasPassword: false } })
    const token = tokenOf(await lastMailTo('odra@fields.example'))
    const agent = server.anonymous()
    expect((await agent.get(`/links/${token}`)).body).toEqual({
      kind: 'invitation',
      name: 'Odra Veltin',
      email: 'odra@fields.example',
    })
    const set = await agent.post('/password/set', { token, password: SENTENCE })
    expect(set).toMatchObject({ status: 200, body: { user: { hasPassword: true } } })
    expect((await agent.get('/session')).status).toBe(200)
    expect((await server.anonymous().post('/password/set', { token, password: SENTENCE })).status).toBe(410)
    expect((await server.anonymous().get(`/links/${token}`)).status).toBe(410)
    expect((await server.anonymous().signIn('odra@fields.example', SENTENCE)).status).toBe(200)
  })

  it('whose mail and job are written together', async () => {
    const admin = await server.signIn('admin')
    await admin.post('/users', { number: await freeNumber(), name: 'Pell Arsk', email: 'pell@fields.example', role: 'analyst' })
    const jobs: { data: { mailId: string } }[] = await server.deps.source.query(
      `SELECT data FROM pgboss.job WHERE name = 'mail-send'`,
    )
    const mail = await lastMailTo('pell@fields.example')
    expect(jobs.filter(({ data }) => data.mailId === mail.id)).toHaveLength(1)
  })

  it('cannot take a number or an address somebody has', async () => {
    const admin = await server.signIn('admin')
    const taken = await createUser(server.deps.source.manager)
    const sameNumber = await admin.post('/users', { number: taken.number, name: 'A', email: 'a@fields.example', role: 'clerk' })
    expect(sameNumber).toMatchObject({ status: 409, body: { error: { code: 'conflict', issues: [{ path: 'number' }] } } })
    const sameAddress = await admin.post('/users', { number: await freeNumber(), name: 'A', email: taken.email, role: 'clerk' })
    expect(sameAddress).toMatchObject({ status: 409, body: { error: { issues: [{ path: 'email' }] } } })
  })

  it('get a reset link that ends their other sessions, and nobody learns whether an address is known', async () => {
    const agent = await server.signIn('clerk')
    const known = await server.anonymous().post('/password/request', { email: agent.user.email })
    const unknown = await server.anonymous().post('/password/request', { email: 'nobody@fields.example' })
    expect([known.status, known.bytes.length]).toEqual([unknown.status, unknown.bytes.length])
    const token = tokenOf(await lastMailTo(agent.user.email))
    expect((await server.anonymous().post('/password/set', { token, password: SENTENCE })).status).toBe(200)
    expect((await agent.get('/session')).status).toBe(401)
    expect((await server.anonymous().signIn(agent.user.email, TEST_PASSWORD)).status).toBe(401)
  })

  it.each([
    ['short', 'fourteen chars', /at least 15/],
    ['one word over and over', 'passwordpassword', /guessed early/],
    ['a row', '123456789012345678', /guessed early/],
    ['their own address', 'person-900@fields.example', /guessed early/],
  ])('cannot set a password that is %s; the link stays good', async (_what, password, message) => {
    const user = await createUser(server.deps.source.manager, { number: 900, email: 'person-900@fields.example' }).catch(
      () => null,
    )
    await server.deps.source.query('DELETE FROM rate_limits')
    const email = user?.email ?? 'person-900@fields.example'
    await server.deps.source.query('DELETE FROM mails WHERE recipient = $1', [email])
    await server.anonymous().post('/password/request', { email })
    const token = tokenOf(await lastMailTo(email))
    const refused = await server.anonymous().post('/password/set', { token, password })
    expect(refused).toMatchObject({ status: 400, body: { error: { issues: [{ path: 'password' }] } } })
    expect((refused.body as { error: { message: string } }).error.message).toMatch(message)
    expect((await server.anonymous().get(`/links/${token}`)).status).toBe(200)
  })

  it('have a new role from their next request on, and the trail says who changed it', async () => {
    const admin = await server.signIn('admin')
    const agent = await server.signIn('clerk')
    expect((await agent.get('/trail')).status).toBe(403)
    await admin.patch(`/users/${agent.user.id}`, { role: 'admin' })
    const trail = await agent.get('/trail')
    expect(trail).toMatchObject({ status: 200 })
    const { entries } = trail.body as { entries: { who: string; text: string }[] }
    expect(entries).toContainEqual(
      expect.objectContaining({ who: admin.user.name, text: `${agent.user.name}: role clerk to admin` }),
    )
    await admin.patch(`/users/${agent.user.id}`, { role: 'clerk' })
  })

  it('who are disabled have no session left', async () => {
    const admin = await server.signIn('admin')
    const agent = await server.signIn('analyst')
    expect(await admin.patch(`/users/${agent.user.id}`, { active: false })).toMatchObject({
      status: 200,
      body: { active: false },
    })
    expect((await agent.get('/session')).status).toBe(401)
    expect((await server.anonymous().signIn(agent.user.email)).status).toBe(401)
  })
})

describe('an empty installation', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
  })
  afterAll(() => server.close())

  it('gets its first admin by one link, once', async () => {
    const stale = await createFirstAdminLink(server.deps.source)
    const token = await createFirstAdminLink(server.deps.source)
    const input = { token, password: SENTENCE, name: 'Ines Korb', email: 'ines@fields.example' }
    expect((await server.anonymous().post('/first-admin', { ...input, token: stale })).status).toBe(410)
    const agent = server.anonymous()
    expect(await agent.post('/first-admin', input)).toMatchObject({ status: 200, body: { user: { role: 'admin', number: 1 } } })
    expect((await agent.get('/users')).status).toBe(200)
    expect((await server.anonymous().post('/first-admin', input)).status).toBe(410)
    await expect(createFirstAdminLink(server.deps.source)).rejects.toThrow('There is an admin already')
  })

  it('keeps its only admin', async () => {
    const admin = server.anonymous()
    await admin.signIn('ines@fields.example', SENTENCE)
    const [me] = (await admin.get('/users')).body as User[]
    for (const change of [{ active: false }, { role: 'clerk' }])
      expect((await admin.patch(`/users/${me?.id}`, change)).status).toBe(409)
  })
})

import { mkdir, writeFile } from 'node:fs/promises'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { withClient } from '../../server/postgres/roles.ts'
import { type BreakableLink, linkTo } from '../support/breakable-link.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { waitFor } from '../support/wait-for.ts'

const errorOf = (body: unknown) => (body as { error: Record<string, unknown> }).error

describe('the server', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
    const { webDir } = server.deps.settings
    await mkdir(`${webDir}/assets`, { recursive: true })
    await writeFile(`${webDir}/index.html`, '<!doctype html><title>Sheafbook</title>')
    await writeFile(`${webDir}/assets/main.js`, 'export {}')
    await writeFile(`${webDir}/.secret`, 'not for the world')
  })
  afterAll(() => server.close())

  it('answers every failure in one shape, with the number of the request', async () => {
    const agent = server.anonymous()
    for (const answer of [
      await agent.get('/nowhere'),
      await agent.get('/session'),
      await agent.post('/session', { email: 'x' }),
    ]) {
      expect(Object.keys(errorOf(answer.body)).filter((key) => key !== 'issues')).toEqual(['code', 'message', 'requestId'])
    }
  })

  it('names every field that was refused', async () => {
    const answer = await server.anonymous().post('/session', { email: 'no address' })
    expect(answer.status).toBe(400)
    expect((errorOf(answer.body).issues as { path: string }[]).map(({ path }) => path)).toEqual(['email', 'password'])
  })

  it.each([
    ['broken JSON', '{"email":', 400, 'invalid'],
    ['too much JSON', JSON.stringify({ email: 'x'.repeat(2_000_000) }), 413, 'too_large'],
  ])('refuses %s and says so', async (_what, body, status, code) => {
    const response = await fetch(`${server.url}/api/session`, {
      method: 'POST',
      headers: { 'Content-Type': 'application/json', 'X-Sheafbook': '1' },
      body,
    })
    expect([response.status, errorOf(await response.json()).code]).toEqual([status, code])
  })

  it('refuses text that cannot be stored', async () => {
    const admin = await server.signIn('admin')
    const answer = await admin.post('/registers/places', { number: 1, name: 'Long\u0000Acre', district: 'Nether Vale' })
    expect([answer.status, errorOf(answer.body).code]).toEqual([400, 'invalid'])
  })

  it('keeps the text of a bug to itself', async () => {
    const admin = await server.signIn('admin')
    // Makes a query fail in a way nobody foresaw, with a text that must not leave.
    await withClient(server.database.ownerUrl, (owner) => owner.query('ALTER TABLE mails RENAME COLUMN body TO a_secret_name'))
    const answer = await admin.get('/mails')
    await withClient(server.database.ownerUrl, (owner) => owner.query('ALTER TABLE mails RENAME COLUMN a_secret_name TO body'))
    expect(answer.status).toBe(500)
    expect(answer.bytes.toString()).not.toMatch(/body|column|mails/)
    expect((await admin.get('/mails')).status).toBe(200)
  })

  it('lets only what it serves itself run in its pages', async () => {
    const { headers } = await fetch(server.url)
    const directives = new Map(
      (headers.get('content-security-policy') ?? '').split(';').map((directive) => {
        const [name = '', ...sources] = directive.trim().split(' ')
        return [name, sources.join(' ')] as const
      }),
    )
    // QUALITY's G-S10, word for word.
    expect(Object.fromEntries(directives)).toEqual({
      'default-src': "'none'",
      'script-src': "'self' 'wasm-unsafe-eval'",
      'style-src': "'self'",
      'connect-src': "'self'",
      'worker-src': "'self'",
      'font-src': "'self'",
      'manifest-src': "'self'",
      'form-action': "'self'",
      'img-src': "'self' blob:",
      'base-uri': "'none'",
      'object-src': "'none'",
      'frame-ancestors': "'none'",
    })
    expect(headers.get('x-content-type-options')).toBe('nosniff')
    expect(headers.get('x-powered-by')).toBeNull()
    expect(headers.get('strict-transport-security')).toBeNull()
  })

  it('gives the web app for every page address, its files, and nothing else of the disk', async () => {
    const statusOf = async (path: string) => (await fetch(`${server.url}${path}`)).status
    for (const path of ['/', '/desk', '/sheets/7d', '/assets/main.js']) expect(await statusOf(path), path).toBe(200)
    for (const path of ['/.secret', '/assets/other.js', '/missing.png', '/..%2f..%2f..%2fpackage.json', '/api/nowhere'])
      expect(await statusOf(path), path).toBe(404)
    expect((await fetch(`${server.url}/assets/main.js`)).headers.get('cache-control')).toContain('immutable')
  })
})

describe('a server whose database restarts', () => {
  let server: TestServer
  let link: BreakableLink
  beforeAll(async () => {
    server = await startTestServer({}, async (url) => {
      link = await linkTo(url)
      return link.url
    })
  })
  afterAll(async () => {
    await server.close()
    await link.close()
  })

  it('answers 503 with a time to wait, within two seconds, and works again by itself', async () => {
    const agent = await server.signIn('clerk')
    await link.cut()
    const began = Date.now()
    for (const path of ['/session', '/health', '/demonstrations']) {
      const away = await agent.get(path)
      expect([away.status, errorOf(away.body).code], path).toEqual([503, 'unavailable'])
      expect(Number(away.headers.get('retry-after')), path).toBeGreaterThan(0)
    }
    // QUALITY's G-R7: 503 within 2 s.
    expect(Date.now() - began).toBeLessThan(2000)
    await link.mend()
    await waitFor(async () => (await agent.get('/session')).status === 200, { what: 'the server to answer again' })
  })
})

describe('a server behind https', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer({ PUBLIC_URL: 'https://sheaf.example.org', TRUSTED_PROXIES: '1' })
  })
  afterAll(() => server.close())

  it('gives a cookie that no other host and no script can take, and asks browsers to stay with https', async () => {
    const response = await fetch(`${server.url}/api/session`, {
      method: 'POST',
      headers: {
        'Content-Type': 'application/json',
        'X-Sheafbook': '1',
        'X-Forwarded-Proto': 'https',
        Origin: 'https://sheaf.example.org',
      },
      body: JSON.stringify(await someone()),
    })
    expect(response.status).toBe(200)
    const cookie = response.headers.getSetCookie().find((line) => line.startsWith('__Host-sheafbook=')) ?? ''
    for (const part of ['HttpOnly', 'Secure', 'SameSite=Lax', 'Path=/']) expect(cookie).toContain(part)
    expect(cookie).not.toContain('Domain')
    expect(response.headers.get('strict-transport-security')).toMatch(/max-age=31536000/)
  })

  it('takes writes from its own address only', async () => {
    const answer = await server
      .anonymous()
      .request('POST', '/session', { body: await someone(), headers: { Origin: server.url } })
    expect(answer.status).toBe(403)
  })

  async function someone() {
    const { createUser, TEST_PASSWORD } = await import('../builders/user.ts')
    const { email } = await createUser(server.deps.source.manager)
    return { email, password: TEST_PASSWORD }
  }
})

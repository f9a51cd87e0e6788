import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createToken } from '../../server/features/tokens/tokens.service.ts'
import { allRoutes } from '../../server/http/routes.ts'
import { SCOPES, type Scope } from '../../shared/schemas/token.ts'
import { ROLES, type Role, type User } from '../../shared/schemas/user.ts'
import { createCommon, createHolding } from '../builders/holding.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { ACCESS, type Common, type Holding, type Rule } from './access-matrix.ts'

type Actor = Role | 'anonymous'
const ACTORS: readonly Actor[] = ['anonymous', ...ROLES]
const names = allRoutes.map(({ method, path }) => `${method.toUpperCase()} ${path}`)

describe('every route', () => {
  let server: TestServer
  let own: Holding
  let others: Holding
  let common: Common
  const people = new Map<Actor, User>()

  beforeAll(async () => {
    server = await startTestServer()
    await createGoldenRegisters(server.deps.source)
    for (const role of ROLES) people.set(role, (await server.signIn(role)).user)
    const clerk = await agentOf('clerk')
    own = await createHolding(server, await server.signIn(people.get('demonstrator')!), clerk)
    others = await createHolding(server, await server.signIn('demonstrator'), clerk)
    common = await createCommon(server)
  })
  afterAll(() => server.close())

  async function agentOf(actor: Actor): Promise<TestAgent> {
    const user = people.get(actor)
    return user ? server.signIn(user) : server.anonymous()
  }

  /** One session a person, but another for the routes that end or swap it. */
  async function agentFor(name: string, standing: TestAgent, actor: Actor): Promise<TestAgent> {
    return /\/session$|first-admin|password/.test(name) ? agentOf(actor) : standing
  }

  function expected(rule: Rule, actor: Actor, isOwn: boolean): readonly number[] {
    const success = rule.butAnswers ?? [200, 201, 204]
    if (rule.may === 'anyone') return success
    if (actor === 'anonymous') return [401]
    if (rule.may !== 'signed in' && !rule.may.includes(actor)) return [403]
    return rule.object && actor === 'demonstrator' && !isOwn ? [404] : [...success, 200, 201, 204]
  }

  it('stands in the table of who may do what, and the table names no route that is gone', () => {
    expect([...names].sort()).toEqual(Object.keys(ACCESS).sort())
    expect(new Set(names).size).toBe(names.length)
  })

  it.each(ACTORS)('lets %s do what the table says, with their own and with another’s', async (actor) => {
    const wrong: string[] = []
    const standing = await agentOf(actor)
    for (const [name, rule] of Object.entries(ACCESS)) {
      for (const holding of rule.object ? [own, others] : [own]) {
        const [method = '', pattern = ''] = name.split(' ')
        const agent = await agentFor(name, standing, actor)
        const body = rule.body?.(holding, common)
        const answer = await agent.request(method, rule.path?.(holding, common) ?? pattern, body === undefined ? {} : { body })
        const wanted = expected(rule, actor, holding === own)
        if (wanted.includes(answer.status)) continue
        wrong.push(
          `${name} (${holding === own ? 'own' : 'another’s'}): ${answer.status} ${answer.bytes.toString().slice(0, 200)}, not ${wanted}`,
        )
      }
    }
    expect(wrong).toEqual([])
  })

  /** A call with a token made for this person, without cookie and without the header of our own pages. */
  async function tokenAgent(actor: Role, scopes: readonly Scope[]): Promise<TestAgent> {
    const { id: userId } = people.get(actor)!
    const { token } = await createToken(server.deps, people.get(actor)!, { name: `for ${userId}`, scopes: [...scopes], days: 1 })
    const agent = server.anonymous()
    const request = agent.request
    agent.request = (method, path, options = {}) =>
      request(method, path, { ...options, headers: { Authorization: `Bearer ${token}`, 'X-Sheafbook': '', ...options.headers } })
    return agent
  }

  it.each(ROLES)('lets a token of a person who is now %s in where its scope and their role both do', async (actor) => {
    const wrong: string[] = []
    const all = await tokenAgent(actor, SCOPES)
    for (const [name, rule] of Object.entries(ACCESS)) {
      if (rule.may === 'anyone') continue
      const [method = '', pattern = ''] = name.split(' ')
      const path = rule.path?.(own, common) ?? pattern
      const body = rule.body?.(own, common)
      const others = rule.token
        ? await tokenAgent(
            actor,
            SCOPES.filter((scope) => scope !== rule.token),
          )
        : null
      for (const [agent, scoped] of [
        [all, rule.token !== undefined],
        [others, false],
      ] as const) {
        if (!agent) continue
        const answer = await agent.request(method, path, body === undefined ? {} : { body })
        const wanted = scoped ? expected(rule, actor, true) : [403]
        if (!wanted.includes(answer.status)) wrong.push(`${name}: ${answer.status}, not ${wanted}`)
      }
      await server.deps.source.query('DELETE FROM api_tokens WHERE scopes <> $1', [SCOPES])
    }
    expect(wrong).toEqual([])
  })

  const UNSAFE = names.filter((name) => !name.startsWith('GET '))

  it.each([
    ['without the header', { 'X-Sheafbook': '' }],
    ['from another origin', { Origin: 'https://elsewhere.example' }],
    ['that a page of another site started', { 'Sec-Fetch-Site': 'cross-site' }],
    ['that a sister site started', { 'Sec-Fetch-Site': 'same-site' }],
  ] satisfies [string, Record<string, string>][])('refuses a write %s', async (_what, headers) => {
    const wrong: string[] = []
    const agent = await agentOf('admin')
    for (const name of UNSAFE) {
      const [method = '', pattern = ''] = name.split(' ')
      const rule = ACCESS[name]
      const answer = await agent.request(method, rule?.path?.(own, common) ?? pattern, { headers })
      const { error } = answer.body as { error: { code: string; message: string } }
      if (answer.status !== 403 || !/another site|X-Sheafbook/.test(error.message)) wrong.push(`${name}: ${answer.status}`)
    }
    expect(wrong).toEqual([])
  })
})

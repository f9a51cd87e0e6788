import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { documentPath } from '../../server/http/openapi.ts'
import { allRoutes } from '../../server/http/routes.ts'
import { documentSchema, exampleOf, nounsOf, scopeOf } from '../../web/features/interface/interface-model.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

interface Operation {
  summary: string
  security: unknown[]
  parameters?: { name: string; in: string }[]
  requestBody?: unknown
  responses: Record<string, unknown>
}

interface Document {
  openapi: string
  paths: Record<string, Record<string, Operation>>
}

describe('the OpenAPI document', () => {
  let server: TestServer
  let document: Document
  beforeAll(async () => {
    server = await startTestServer()
    document = (await server.anonymous().get('/openapi.json')).body as Document
  })
  afterAll(() => server.close())

  it('says that files are sent as multipart, in the field "files"', () => {
    expect(JSON.stringify(document.paths['/uploads']?.post?.requestBody)).toContain(
      '"multipart/form-data":{"schema":{"type":"object","required":["files"]',
    )
  })

  it('is of version 3.1 and holds every route there is, and no other', () => {
    expect(document.openapi).toBe('3.1.0')
    const described = Object.entries(document.paths).flatMap(([path, methods]) => Object.keys(methods).map((m) => `${m} ${path}`))
    expect(described.sort()).toEqual(allRoutes.map(({ method, path }) => `${method} ${documentPath(path)}`).sort())
  })

  it('says of each who may call it, what it takes and what it answers', () => {
    for (const { method, path, access, params, body, multipart } of allRoutes) {
      const operation = document.paths[documentPath(path)]?.[method]
      expect(operation?.summary, path).toBeTruthy()
      expect(operation?.security.length === 0, path).toBe(access === 'anyone')
      const inPath = (operation?.parameters ?? []).filter((p) => p.in === 'path').map((p) => p.name)
      expect(inPath, path).toEqual(params ? [...path.matchAll(/:(\w+)/g)].map((match) => match[1]) : [])
      expect(operation?.requestBody !== undefined, path).toBe(body !== undefined || multipart !== undefined)
      expect(Object.keys(operation?.responses ?? {}), path).toContain('default')
    }
  })

  it('is what the guide in the app reads: every route, by noun, with the scope of its token', () => {
    const guide = nounsOf(documentSchema.parse(document), true)
    expect(guide.flatMap(({ entries }) => entries)).toHaveLength(allRoutes.length)
    const withToken = nounsOf(documentSchema.parse(document), false).flatMap(({ entries }) => entries)
    const scoped = allRoutes.filter((route) => route.scope !== undefined)
    expect(withToken.map(({ operation }) => scopeOf(operation)).sort()).toEqual(scoped.map((route) => route.scope).sort())
    const make = withToken.find(({ method, path }) => method === 'POST' && path === '/webhooks')!
    expect(exampleOf(make, 'https://sheaf.example')).toBe(
      'curl -X POST -H "Authorization: Bearer $TOKEN" -H "Content-Type: application/json" ' +
        `-d '{"url":"https://data.example.org/","events":["record.entered"]}' "https://sheaf.example/api/webhooks"`,
    )
  })
})

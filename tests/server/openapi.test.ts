import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { documentPath } from '../../server/http/openapi.ts'
import { allRoutes } from '../../server/http/routes.ts'
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
})

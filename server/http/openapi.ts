/** The OpenAPI 3.1 document, made from the same route values that the router is made from. */
import { OpenAPIRegistry, OpenApiGeneratorV31, type RouteConfig } from '@asteasolutions/zod-to-openapi'
import { z } from 'zod'
import { SCOPE_WORDS } from '../../shared/schemas/token.ts'
import { type Route, route } from './route.ts'

type Parameters = NonNullable<RouteConfig['request']>['params']

const JSON_TYPE = 'application/json'
const FILES: Record<string, string> = {
  pdf: 'application/pdf',
  csv: 'text/csv',
  xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  parquet: 'application/vnd.apache.parquet',
  zip: 'application/zip',
  picture: 'image/jpeg',
  original: 'application/octet-stream',
}

const errorSchema = z.object({
  error: z.object({
    code: z.string(),
    message: z.string(),
    issues: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
    requestId: z.string(),
  }),
})

/** /sheets/:id -> /sheets/{id}, as the document writes it. */
export const documentPath = (path: string) => path.replace(/:(\w+)/g, '{$1}')

export function describeRoutes(routes: readonly Route[]) {
  const registry = new OpenAPIRegistry()
  registry.registerComponent('securitySchemes', 'session', { type: 'apiKey', in: 'cookie', name: 'sheafbook' })
  registry.registerComponent('securitySchemes', 'token', {
    type: 'http',
    scheme: 'bearer',
    description: `Made by an analyst. Scopes: ${Object.entries(SCOPE_WORDS)
      .map(([scope, words]) => `${scope} (${words})`)
      .join('; ')}.`,
  })
  for (const one of routes) registry.registerPath(describe(one))
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Sheafbook',
      version: '1',
      description:
        'Programs send a token: Authorization: Bearer TOKEN. Browsers sign in; their writes carry the header X-Sheafbook: 1. ' +
        'Over https the cookie is named __Host-sheafbook.',
    },
    servers: [{ url: '/api' }],
  })
}

function describe({
  method,
  path,
  summary,
  access,
  scope,
  params,
  query,
  body,
  multipart,
  response,
  status,
}: Route): RouteConfig {
  const roles = typeof access === 'string' ? access : access.join(', ')
  return {
    method,
    path: documentPath(path),
    summary,
    description: `Open to: ${roles}.`,
    tags: [path.split('/')[1]?.split('.')[0] ?? ''],
    security: access === 'anyone' ? [] : [{ session: [] }, ...(scope ? [{ token: [scope] }] : [])],
    request: {
      ...(params ? { params: params as Parameters } : {}),
      ...(query ? { query: query as Parameters } : {}),
      ...(multipart ? { body: { required: true, content: { 'multipart/form-data': { schema: multipart } } } } : {}),
      ...(body ? { body: { required: true, content: { [JSON_TYPE]: { schema: body } } } } : {}),
    },
    responses: {
      ...(response
        ? { [status ?? 200]: { description: summary, content: { [JSON_TYPE]: { schema: response } } } }
        : answerWithoutJson(path, summary)),
      default: { description: 'A refusal or a failure', content: { [JSON_TYPE]: { schema: errorSchema } } },
    },
  }
}

function answerWithoutJson(path: string, summary: string): RouteConfig['responses'] {
  const type = FILES[/(\w+)$/.exec(path)?.[1] ?? '']
  if (!type) return { 204: { description: summary } }
  return { 200: { description: summary, content: { [type]: { schema: { type: 'string', format: 'binary' } } } } }
}

/** The document's own route; `routes` are all the others. */
export function openapiRoute(routes: readonly Route[]): Route {
  let made: Record<string, unknown> | undefined
  const own: Route = route({
    method: 'get',
    path: '/openapi.json',
    summary: 'This document',
    access: 'anyone',
    response: z.record(z.string(), z.unknown()),
    handle: () => {
      made ??= { ...describeRoutes([...routes, own]) }
      return made
    },
  })
  return own
}

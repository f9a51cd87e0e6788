/** Makes the router from the route values: access, then input, then the handler, then the answer. */
import { isDeepStrictEqual } from 'node:util'
import { type Request, type Response, Router } from 'express'
import type { User } from '../../shared/schemas/user.ts'
import { checkAccess, checkScope } from './access.ts'
import type { Deps, Route } from './route.ts'
import { validate } from './validate.ts'

interface MountOptions {
  /** Compares every answer with its schema and fails on any difference: for tests. */
  checkResponses?: boolean
}

export function mount(routes: readonly Route[], deps: Deps, options: MountOptions = {}): Router {
  const router = Router({ caseSensitive: true })
  for (const route of [...routes].sort(byPath)) {
    router[route.method](route.path, (req, res) => handle(route, deps, options, req, res))
  }
  return router
}

async function handle(route: Route, deps: Deps, options: MountOptions, req: Request, res: Response): Promise<void> {
  const actor = (req.user as User | undefined) ?? null
  checkAccess(route.access, actor)
  checkScope(route, req.scopes)
  const params = validate('params', route.params, req.params)
  const query = validate('query', route.query, req.query)
  const body = validate('body', route.body, req.body)
  const answer = await route.handle({ deps, actor: actor as User, params, query, body, req, res })
  if (!route.response || res.headersSent) return
  if (options.checkResponses) checkResponse(route, answer)
  res.status(route.status ?? 200).json(answer)
}

/** @throws Error when the answer has a field too many, one too few, or one of another kind than the schema says */
function checkResponse(route: Route, answer: unknown): void {
  const sent: unknown = JSON.parse(JSON.stringify(answer))
  const parsed: unknown = route.response?.parse(sent)
  if (isDeepStrictEqual(parsed, sent)) return
  throw new Error(`${route.method} ${route.path} answers otherwise than its schema says: ${JSON.stringify(sent)}`)
}

/** /records/dictionary.csv before /records/:number, whatever order the features list them in. */
function byPath(a: Route, b: Route): number {
  const rank = (path: string) => path.replace(/:/g, '\uffff')
  return rank(a.path) < rank(b.path) ? -1 : 1
}

/**
 * A route as a value: who may call it, what it takes, what it answers. The router, the OpenAPI document and the test that walks
 * every route with every role are all made from these, so a route cannot be left out of any of them.
 */
import type { Request, Response } from 'express'
import type PgBoss from 'pg-boss'
import type { z } from 'zod'
import type { Scope } from '../../shared/schemas/token.ts'
import type { Role, User } from '../../shared/schemas/user.ts'
import type { Settings } from '../config.ts'
import type { DataSource } from '../db/database.ts'
import type { FileStore } from '../storage/store.ts'

/** What the process has: handed in, so that tests hand in their own. */
export interface Deps {
  source: DataSource
  boss: PgBoss
  files: FileStore
  settings: Settings
}

export type Access = 'anyone' | 'signed in' | readonly Role[]

interface Input<A extends Access, P, Q, B> {
  deps: Deps
  /** Who is signed in; null only where anyone may call. */
  actor: A extends 'anyone' ? User | null : User
  params: P
  query: Q
  body: B
  req: Request
  res: Response
}

export interface Route<A extends Access = Access, P = unknown, Q = unknown, B = unknown, R = unknown> {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete'
  /** Express path below /api, such as /sheets/:id. */
  path: string
  summary: string
  access: A
  /** The scope a token needs here; without it the route is for people who signed in. */
  scope?: Scope
  params?: z.ZodType<P>
  query?: z.ZodType<Q>
  body?: z.ZodType<B>
  /** What a multipart body holds, as JSON Schema; the handler receives the files itself. */
  multipart?: Record<string, unknown>
  /** JSON answer. Without it the handler answers by itself (files, 204). */
  response?: z.ZodType<R>
  /** 200 unless told. */
  status?: number
  handle(input: Input<A, P, Q, B>): Promise<R> | R
}

/** Infers the input types of one route and forgets them again, so that routes of all shapes fit one table. */
export function route<const A extends Access, P = unknown, Q = unknown, B = unknown, R = void>(
  definition: Route<A, P, Q, B, R>,
): Route {
  return definition as unknown as Route
}

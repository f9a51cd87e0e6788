import { z } from 'zod'
import { createdTokenSchema, createTokenSchema, tokenSchema } from '../../../shared/schemas/token.ts'
import { idSchema } from '../../../shared/schemas/user.ts'
import { type Route, route } from '../../http/route.ts'
import { createToken, listOwnTokens, revokeOwnToken } from './tokens.service.ts'

const MAKERS = ['analyst', 'admin'] as const

/** None of them takes a token: a token that leaked could make its successor. */
export const tokenRoutes: Route[] = [
  route({
    method: 'get',
    path: '/tokens',
    summary: 'Your tokens, newest first',
    access: MAKERS,
    response: z.array(tokenSchema),
    handle: ({ deps, actor }) => listOwnTokens(deps, actor),
  }),
  route({
    method: 'post',
    path: '/tokens',
    summary: 'Make a token: it is shown in this answer and never again',
    access: MAKERS,
    body: createTokenSchema,
    response: createdTokenSchema,
    status: 201,
    handle: ({ deps, actor, body }) => createToken(deps, actor, body),
  }),
  route({
    method: 'post',
    path: '/tokens/:id/revoke',
    summary: 'Revoke a token: its next call is refused',
    access: MAKERS,
    params: z.object({ id: idSchema }),
    response: tokenSchema,
    handle: ({ deps, actor, params }) => revokeOwnToken(deps, actor, params.id),
  }),
]

import { z } from 'zod'
import { idSchema, inviteUserSchema, updateUserSchema, userSchema } from '../../../shared/schemas/user.ts'
import { listDemonstrators, listUsers } from '../../db/repositories/user.ts'
import { route } from '../../http/route.ts'
import { inviteAgain, inviteUser, updateUser } from './users.service.ts'

const byId = z.object({ id: idSchema })
const demonstratorSchema = userSchema.pick({ id: true, number: true, name: true })

export const userRoutes = [
  route({
    method: 'get',
    path: '/users',
    summary: 'Everybody who may or might sign in',
    access: ['admin'],
    response: z.array(userSchema),
    handle: ({ deps }) => listUsers(deps.source.manager),
  }),
  route({
    method: 'post',
    path: '/users',
    summary: 'Add a person and send the invitation',
    access: ['admin'],
    body: inviteUserSchema,
    response: userSchema,
    status: 201,
    handle: ({ deps, actor, body }) => inviteUser(deps, actor, body),
  }),
  route({
    method: 'patch',
    path: '/users/:id',
    summary: 'Change name or role, disable or enable',
    access: ['admin'],
    params: byId,
    body: updateUserSchema,
    response: userSchema,
    handle: ({ deps, actor, params, body }) => updateUser(deps, actor, params.id, body),
  }),
  route({
    method: 'post',
    path: '/users/:id/invite',
    summary: 'Send the invitation again',
    access: ['admin'],
    params: byId,
    response: userSchema,
    handle: ({ deps, actor, params }) => inviteAgain(deps, actor, params.id),
  }),
  route({
    method: 'get',
    path: '/demonstrators',
    summary: 'Demonstrators, to plan with',
    access: 'signed in',
    response: z.array(demonstratorSchema),
    handle: ({ deps }) => listDemonstrators(deps.source.manager),
  }),
]

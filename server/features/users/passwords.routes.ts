import { z } from 'zod'
import {
  firstAdminSchema,
  oneTimeLinkSchema,
  requestResetSchema,
  sessionSchema,
  setPasswordSchema,
} from '../../../shared/schemas/user.ts'
import { route } from '../../http/route.ts'
import { openSession } from '../session/sign-in.ts'
import { makeFirstAdmin } from './first-admin.ts'
import { describeLink } from './links.ts'
import { requestReset, setPassword } from './passwords.service.ts'

export const passwordRoutes = [
  route({
    method: 'post',
    path: '/password/request',
    summary: 'Ask for a link to set a new password; the answer is always the same',
    access: 'anyone',
    body: requestResetSchema,
    handle: ({ deps, body, req, res }) => {
      // Answered before it is known whether anybody has the address: not even the time tells.
      requestReset(deps, body.email).catch((error: unknown) => req.log.warn({ err: error }, 'no reset link was sent'))
      res.status(202).end()
    },
  }),
  route({
    method: 'get',
    path: '/links/:token',
    summary: 'What a one-time link is for',
    access: 'anyone',
    params: z.object({ token: z.string().max(200) }),
    response: oneTimeLinkSchema,
    handle: ({ deps, params }) => describeLink(deps.source.manager, params.token),
  }),
  route({
    method: 'post',
    path: '/password/set',
    summary: 'Set the password of an invitation or a reset, and sign in',
    access: 'anyone',
    body: setPasswordSchema,
    response: sessionSchema,
    handle: async ({ deps, body, req }) => {
      const user = await setPassword(deps, body)
      await openSession(deps, req, user)
      return { user }
    },
  }),
  route({
    method: 'post',
    path: '/first-admin',
    summary: 'Make the first admin by the link the start command printed, and sign in',
    access: 'anyone',
    body: firstAdminSchema,
    response: sessionSchema,
    handle: async ({ deps, body, req }) => {
      const user = await makeFirstAdmin(deps.source, body)
      await openSession(deps, req, user)
      return { user }
    },
  }),
]

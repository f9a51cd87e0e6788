import { sessionSchema, signInSchema } from '../../../shared/schemas/user.ts'
import { route } from '../../http/route.ts'
import { cookieName } from '../../http/session.ts'
import { writeTrail } from '../trail/trail.service.ts'
import { authenticate, closeSession, openSession } from './sign-in.ts'

export const sessionRoutes = [
  route({
    method: 'post',
    path: '/session',
    summary: 'Sign in',
    access: 'anyone',
    body: signInSchema,
    response: sessionSchema,
    handle: async ({ deps, req, body }) => {
      req.body = body
      const user = await authenticate(deps, req)
      await openSession(deps, req, user)
      await writeTrail(deps.source.manager, {
        actor: user,
        action: 'sign in',
        subject: 'user',
        subjectId: user.id,
        text: `${user.name} signed in`,
      })
      return { user }
    },
  }),
  route({
    method: 'get',
    path: '/session',
    summary: 'Who is signed in',
    access: 'signed in',
    response: sessionSchema,
    handle: ({ actor }) => ({ user: actor }),
  }),
  route({
    method: 'delete',
    path: '/session',
    summary: 'Sign out',
    access: 'anyone',
    handle: async ({ deps, req, res }) => {
      await closeSession(req)
      res.clearCookie(cookieName(deps.settings.publicUrl), { path: '/' }).status(204).end()
    },
  }),
]

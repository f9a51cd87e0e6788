import { pipeline } from 'node:stream/promises'
import { z } from 'zod'
import { UserError } from '../../../shared/errors.ts'
import { uploadSchema } from '../../../shared/schemas/upload.ts'
import { idSchema } from '../../../shared/schemas/user.ts'
import { type Route, route } from '../../http/route.ts'
import { openOriginal, openPicture } from './pages.service.ts'
import { withReceivedFiles } from './receive.ts'
import { getSheetToAnswer } from './sheet-to-answer.ts'
import { checkPace, getSent, listSent, takeFiles } from './uploads.service.ts'

const SENDERS = ['demonstrator', 'clerk', 'admin'] as const
const VIEWERS = ['demonstrator', 'clerk', 'analyst', 'admin'] as const
const params = z.object({ id: idSchema })
const uploadsSchema = z.object({ uploads: z.array(uploadSchema) })
const fieldsSchema = z.object({ forSheet: idSchema.optional() })

const MULTIPART = {
  type: 'object',
  required: ['files'],
  properties: {
    files: { type: 'array', items: { type: 'string', format: 'binary' } },
    forSheet: { type: 'string', format: 'uuid', description: 'the sheet that was sent back and is answered' },
  },
}

export const uploadRoutes: Route[] = [
  route({
    method: 'post',
    path: '/uploads',
    summary: 'Send files: multipart, field "files", several at once; each has its own outcome',
    access: SENDERS,
    multipart: MULTIPART,
    response: uploadsSchema,
    status: 201,
    handle: async ({ deps, actor, req, res }) => {
      await checkPace(deps, actor)
      return withReceivedFiles(req, res, async (files, fields) => {
        const parsed = fieldsSchema.safeParse(fields)
        if (!parsed.success) throw new UserError('invalid', 'The field "forSheet" must name a sheet.')
        const forSheetId = await getSheetToAnswer(deps, actor, parsed.data.forSheet)
        return { uploads: await takeFiles(deps, { actor, forSheetId }, files) }
      })
    },
  }),
  route({
    method: 'get',
    path: '/uploads',
    summary: 'Files that were sent, newest first; a demonstrator sees their own',
    access: SENDERS,
    response: uploadsSchema,
    handle: async ({ deps, actor }) => ({ uploads: await listSent(deps, actor) }),
  }),
  route({
    method: 'get',
    path: '/uploads/:id',
    summary: 'A file and what became of each of its pages',
    access: SENDERS,
    params,
    response: uploadSchema,
    handle: ({ deps, actor, params }) => getSent(deps, actor, params.id),
  }),
  route({
    method: 'get',
    path: '/pages/:id/picture',
    summary: 'The flattened page as JPEG, 1240 x 1754 pixels for an A4 sheet',
    access: VIEWERS,
    scope: 'book',
    params,
    handle: async ({ deps, actor, params, req, res }) => {
      const { stream, key } = await openPicture(deps, actor, params.id)
      res.set({ 'Content-Type': 'image/jpeg', 'Cache-Control': 'private, no-cache', ETag: `"${key.replace(/^.*\//, '')}"` })
      if (req.fresh) {
        stream.destroy()
        res.status(304).end()
      } else await pipeline(stream, res)
    },
  }),
  route({
    method: 'get',
    path: '/pages/:id/original',
    summary: 'The file a page came in, as it was sent; with ?as=picture, something a browser can show where there is one',
    access: VIEWERS,
    scope: 'book',
    params,
    query: z.object({ as: z.literal('picture').optional() }),
    handle: async ({ deps, actor, params, query, res }) => {
      const { stream, type, fileName } = await openOriginal(deps, actor, params.id, query.as === 'picture')
      res.attachment(fileName)
      // Whatever the bytes are, a browser may show them as this type or save them; it may not run them.
      res.set({ 'Content-Type': type, 'X-Content-Type-Options': 'nosniff', 'Cache-Control': 'private, no-cache' })
      await pipeline(stream, res)
    },
  }),
]

/** A file that came in, and what became of each of its pages. */
import { z } from 'zod'
import { sheetStateSchema } from './sheet.ts'
import { idSchema } from './user.ts'

export const UPLOAD_KINDS = ['jpeg', 'png', 'webp', 'heic', 'tiff', 'pdf', 'xlsx', 'csv'] as const
export const uploadKindSchema = z.enum(UPLOAD_KINDS)
export type UploadKind = z.infer<typeof uploadKindSchema>

export const PAGE_STATES = ['arrived', 'being read', 'read', 'take again', 'unreadable'] as const

export const uploadPageSchema = z.object({
  id: idSchema,
  number: z.number().int(),
  state: z.enum(PAGE_STATES),
  takeAgain: z.object({ code: z.string(), advice: z.string() }).nullable(),
  sheet: z
    .object({ id: idSchema, code: z.string().nullable(), state: sheetStateSchema, openDoubts: z.number().int() })
    .nullable(),
})

export const uploadSchema = z.object({
  id: idSchema,
  fileName: z.string(),
  kind: uploadKindSchema.nullable(),
  bytes: z.number().int(),
  sha256: z.string(),
  receivedAt: z.string(),
  /** not accepted: the file is not kept, `reason` says why and what to do. */
  state: z.enum(['arrived', 'being read', 'done', 'not accepted']),
  reason: z.string().nullable(),
  /** The same file came before: this is that upload. */
  seenBefore: z.boolean(),
  pages: z.array(uploadPageSchema),
})
export type Upload = z.infer<typeof uploadSchema>

/** What happened to the trial book, in the order in which it became visible. */
import { z } from 'zod'
import { recordRowSchema } from './record.ts'

export const changeSchema = z.object({
  /** Grows with every change; numbers may be left out, none comes late. */
  position: z.number().int(),
  /** entered: a new record; changed: a further version, or challenged; withdrawn: it stands in the book no more. */
  what: z.enum(['entered', 'changed', 'withdrawn']),
  number: z.number().int(),
  version: z.number().int(),
  at: z.string(),
  /** The record as it stands now, which may be later than this change; null when it stands there no more. */
  record: recordRowSchema.nullable(),
})
export type Change = z.infer<typeof changeSchema>

export const listChangesSchema = z.object({
  /** The last position seen; 0 from the beginning. */
  after: z.coerce.number().int().min(0).default(0),
  limit: z.coerce.number().int().min(1).max(200).default(100),
})
/** `next` is what to ask after; it stays the same when nothing is new. */
export const changeListSchema = z.object({ changes: z.array(changeSchema), next: z.number().int(), more: z.boolean() })
export type ChangeList = z.infer<typeof changeListSchema>
export type ListChanges = z.infer<typeof listChangesSchema>

/** The leaf: the one page the farmer takes home. */
import { z } from 'zod'

export const leafStatusSchema = z.object({
  /** Why it cannot be sent by mail now; null when it can. */
  why: z.string().nullable(),
  /** The plan that can take the farmer's e-mail address, where its lack is why; else null. */
  planId: z.string().nullable(),
  /** Versions of the record whose leaf was handed to the mail, newest first. */
  sent: z.array(
    z.object({
      version: z.number().int(),
      by: z.string(),
      at: z.string(),
      state: z.enum(['queued', 'sent', 'failed']),
      error: z.string().nullable(),
    }),
  ),
})
export type LeafStatus = z.infer<typeof leafStatusSchema>

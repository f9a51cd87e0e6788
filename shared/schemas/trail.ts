import { z } from 'zod'

/** One line of the audit trail. Nobody can change or delete it. */
export const trailEntrySchema = z.object({
  id: z.number().int(),
  at: z.string(),
  who: z.string(),
  action: z.string(),
  subject: z.string(),
  subjectId: z.string().nullable(),
  text: z.string(),
  /** Code of the sheet it was done to; null for other subjects, and for a sheet without one. */
  sheetCode: z.string().nullable(),
})
export type TrailEntry = z.infer<typeof trailEntrySchema>
export const trailListSchema = z.object({ entries: z.array(trailEntrySchema), next: z.number().int().nullable() })

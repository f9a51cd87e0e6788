import { z } from 'zod'
import { idSchema } from './user.ts'

export const mailSchema = z.object({
  id: idSchema,
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  state: z.enum(['queued', 'sent', 'failed']),
  createdAt: z.string(),
  sentAt: z.string().nullable(),
  error: z.string().nullable(),
})
export type Mail = z.infer<typeof mailSchema>

/** Access for programs: a token stands for the person who made it, for some of what they may do, until a day. */
import { z } from 'zod'
import { idSchema } from './user.ts'

/** What a token may be used for. Everything else needs a person who signs in. */
export const SCOPES = ['book', 'changes', 'webhooks'] as const
export const scopeSchema = z.enum(SCOPES)
export type Scope = z.infer<typeof scopeSchema>

export const SCOPE_WORDS: Record<Scope, string> = {
  book: 'read the trial book, its downloads, layouts and pictures',
  changes: 'follow what is entered and changed',
  webhooks: 'manage webhooks',
}

export const TOKEN_LIMITS = { a_person: 20, most_days: 366, calls_per_min: 600 } as const

export const tokenSchema = z.object({
  id: idSchema,
  name: z.string(),
  /** Its last characters: enough to tell tokens apart, not to use one. */
  ending: z.string(),
  scopes: z.array(scopeSchema),
  createdAt: z.string(),
  expiresAt: z.string(),
  /** To the minute. */
  lastUsedAt: z.string().nullable(),
  revokedAt: z.string().nullable(),
})
export type ApiToken = z.infer<typeof tokenSchema>

export const createTokenSchema = z.object({
  name: z.string().trim().min(1, 'say what it is for').max(60),
  scopes: z.array(scopeSchema).min(1, 'choose at least one'),
  days: z.coerce.number().int().min(1).max(TOKEN_LIMITS.most_days),
})
export type CreateToken = z.infer<typeof createTokenSchema>

/** The only answer that ever holds the token itself. */
export const createdTokenSchema = tokenSchema.extend({ token: z.string() })
export type CreatedToken = z.infer<typeof createdTokenSchema>

import { z } from 'zod'

/** What each role may do is in server/http/access.ts; the words are the product's. */
export const ROLES = ['demonstrator', 'clerk', 'analyst', 'admin'] as const
export const roleSchema = z.enum(ROLES)
export type Role = z.infer<typeof roleSchema>

/** With a password as the only factor: NIST SP 800-63B-4 asks for 15 characters and no composition rules. */
export const PASSWORD_MIN = 15
export const PASSWORD_MAX = 128

export const idSchema = z.uuid()
/** The number people write on a sheet: 1 to 9999, unique within its register. */
export const numberSchema = z.coerce.number().int().min(1).max(9999)
export const nameSchema = z.string().trim().min(1).max(120)
export const emailSchema = z.email().trim().toLowerCase().max(254)
export const passwordSchema = z
  .string()
  .min(PASSWORD_MIN, `at least ${PASSWORD_MIN} characters; a sentence does well`)
  .max(PASSWORD_MAX, `at most ${PASSWORD_MAX} characters`)

export const userSchema = z.object({
  id: idSchema,
  number: numberSchema,
  name: nameSchema,
  email: emailSchema,
  role: roleSchema,
  active: z.boolean(),
  /** false until the invitation is used. */
  hasPassword: z.boolean(),
})
export type User = z.infer<typeof userSchema>

export const signInSchema = z.object({ email: emailSchema, password: z.string().min(1).max(PASSWORD_MAX) })
export type SignIn = z.infer<typeof signInSchema>

export const inviteUserSchema = z.object({ number: numberSchema, name: nameSchema, email: emailSchema, role: roleSchema })
export type InviteUser = z.infer<typeof inviteUserSchema>

export const updateUserSchema = z.object({ name: nameSchema, role: roleSchema, active: z.boolean() }).partial()
export type UpdateUser = z.infer<typeof updateUserSchema>

export const requestResetSchema = z.object({ email: emailSchema })
/** Uses the one-time link of an invitation, a reset or the first admin. */
export const setPasswordSchema = z.object({ token: z.string().min(20).max(200), password: passwordSchema })
/** The first admin has no invitation: the link printed by the start command carries the token. */
export const firstAdminSchema = setPasswordSchema.extend({ name: nameSchema, email: emailSchema })

/** What a one-time link is for; name and address of the person it was sent to, if there is one yet. */
export const oneTimeLinkSchema = z.object({
  kind: z.enum(['invitation', 'reset', 'first admin']),
  name: z.string().nullable(),
  email: z.string().nullable(),
})
export type OneTimeLink = z.infer<typeof oneTimeLinkSchema>

export const sessionSchema = z.object({ user: userSchema })
export type Session = z.infer<typeof sessionSchema>

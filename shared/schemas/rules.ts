/** The rules as a page lists them: in plain words, with their limits and how often they fired and were right. */
import { z } from 'zod'

export const CERTAINTIES = ['published', 'from memory', 'common practice'] as const

export const ruleLimitSchema = z.object({
  name: z.string(),
  value: z.number(),
  /** As the product ships it. */
  usual: z.number(),
  unit: z.string(),
  source: z.string(),
  certainty: z.enum(CERTAINTIES),
})
export type RuleLimit = z.infer<typeof ruleLimitSchema>

export const ruleRowSchema = z.object({
  id: z.string(),
  version: z.number().int(),
  name: z.string(),
  severity: z.array(z.enum(['stop', 'doubt', 'note'])),
  why: z.string(),
  limits: z.array(z.string()),
  fired: z.number().int(),
  /** A cell it named was corrected, or its sheet sent back. */
  right: z.number().int(),
  /** A person let it stand. */
  letStand: z.number().int(),
  open: z.number().int(),
})
export type RuleRow = z.infer<typeof ruleRowSchema>

const settingsVersionSchema = z.object({ version: z.number().int(), setBy: z.string(), setAt: z.string(), why: z.string() })
export type SettingsVersion = z.infer<typeof settingsVersionSchema>

export const rulePageSchema = z.object({
  rulesVersion: z.string(),
  /** 0: the limits the product ships with. */
  settingsVersion: z.number().int(),
  versions: z.array(settingsVersionSchema),
  limits: z.array(ruleLimitSchema),
  rules: z.array(ruleRowSchema),
})
export type RulePage = z.infer<typeof rulePageSchema>

export const saveLimitsSchema = z.object({
  /** Limits to set, by name; null puts one back to what the product ships with. */
  limits: z.record(z.string(), z.number().nullable()),
  why: z.string().trim().min(3).max(500),
  /** The version this was made on. */
  version: z.number().int(),
})
export type SaveLimits = z.infer<typeof saveLimitsSchema>

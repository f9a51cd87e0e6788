/** A record of the trial book: the readings of an entered sheet and the results computed from them. */
import { z } from 'zod'
import { doubtSchema, historySchema, pageSchema, readingSchema } from './sheet.ts'
import { idSchema } from './user.ts'

export const resultSchema = z.object({
  key: z.string(),
  label: z.string(),
  /** Unrounded; null with a reason. */
  value: z.number().nullable(),
  unit: z.string(),
  /** Standard uncertainty and U = k u, in `unit`; null where no budget is made. */
  u: z.number().nullable(),
  U: z.number().nullable(),
  k: z.number(),
  from: z.array(z.string()),
  formula: z.string(),
  assumes: z.array(z.string()),
  budget: z.array(z.record(z.string(), z.unknown())),
  reason: z.object({ code: z.string(), text: z.string(), rule: z.string().optional() }).nullable(),
})
export type ResultValue = z.infer<typeof resultSchema>
export const resultsSchema = z.record(z.string(), resultSchema)

const namedSchema = z.object({ id: idSchema.nullable(), number: z.number().nullable(), name: z.string() })

export const recordRowSchema = z.object({
  number: z.number().int(),
  version: z.number().int(),
  state: z.enum(['entered', 'challenged', 'superseded']),
  sheetId: idSchema,
  sheetCode: z.string().nullable(),
  trialDate: z.string().nullable(),
  place: namedSchema,
  demonstrator: namedSchema,
  tractor: namedSchema,
  implement: namedSchema.extend({ operation: z.string().nullable() }),
  gear: z.string().nullable(),
  soilClass: z.string().nullable(),
  results: resultsSchema,
})
export type RecordRow = z.infer<typeof recordRowSchema>

export const recordSchema = recordRowSchema.extend({
  /** The run it was planned as; null for a sheet without a plan. */
  run: z.object({ plot: z.string(), number: z.number().int() }).nullable(),
  readings: z.array(readingSchema),
  notes: z.array(doubtSchema),
  facts: z.record(z.string(), z.unknown()),
  rulesVersion: z.string(),
  formulaVersion: z.string(),
  layout: z.string(),
  layoutVersion: z.number().int(),
  enteredBy: z.string(),
  enteredAt: z.string(),
  challenge: z.object({ by: z.string(), at: z.string(), reason: z.string() }).nullable(),
  pages: z.array(pageSchema),
  history: z.array(historySchema),
  versions: z.array(z.object({ version: z.number().int(), enteredAt: z.string(), enteredBy: z.string() })),
})
export type TrialRecord = z.infer<typeof recordSchema>

/** Filters of the trial book; they stand in the address, so a view can be sent to a colleague. */
export const listRecordsSchema = z.object({
  /** A record number, or a sheet code or part of one, with or without its hyphens. */
  find: z.string().trim().max(20).optional(),
  tractor: idSchema.optional(),
  implement: idSchema.optional(),
  place: idSchema.optional(),
  operation: z.string().max(40).optional(),
  soil: z.string().max(20).optional(),
  from: z.iso.date().optional(),
  to: z.iso.date().optional(),
  after: z.coerce.number().int().optional(),
})
export type ListRecords = z.infer<typeof listRecordsSchema>
export const recordListSchema = z.object({
  records: z.array(recordRowSchema),
  total: z.number().int(),
  next: z.number().int().nullable(),
})

export const challengeSchema = z.object({ reason: z.string().trim().min(3).max(500) })

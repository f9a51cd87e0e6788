/** One value of the trial book: a reading as it stands in a record, or a figure computed from the readings. */
import { z } from 'zod'
import { originSchema, settlementSchema } from './sheet.ts'

/** Names that differ in more than case: data frames and databases would take `u` and `U` for one column. */
export const bookValueSchema = z.object({
  record: z.number().int(),
  version: z.number().int(),
  state: z.string(),
  sheet: z.string().nullable(),
  layout: z.string().nullable(),
  trial_date: z.string().nullable(),
  place: z.string().nullable(),
  tractor: z.string().nullable(),
  implement: z.string().nullable(),
  kind: z.enum(['reading', 'figure']),
  key: z.string(),
  label: z.string(),
  value: z.number().nullable(),
  text: z.string().nullable(),
  unit: z.string().nullable(),
  u: z.number().nullable(),
  expanded_u: z.number().nullable(),
  k: z.number().nullable(),
  formula: z.string().nullable(),
  made_from: z.string().nullable(),
  formula_version: z.string(),
  rules_version: z.string(),
  origin: z.union([originSchema, z.literal('formula')]),
  cell: z.string().nullable(),
  settlement: settlementSchema.nullable(),
  settled_by: z.string().nullable(),
  settled_at: z.string().nullable(),
  why: z.string().nullable(),
  ink: z.string(),
})
export type BookValue = z.infer<typeof bookValueSchema>

/** Whole records at a time, newest first; `after` is the last record seen. */
export const listValuesSchema = z.object({
  after: z.coerce.number().int().positive().optional(),
  records: z.coerce.number().int().min(1).max(50).default(10),
})
export const valueListSchema = z.object({ values: z.array(bookValueSchema), next: z.number().int().nullable() })

/** What the reader says of one page: printed by `npm run read`, stored by the worker, compared by the bench. */
import { z } from 'zod'
import { resultSchema } from './record.ts'
import { candidateSchema, valueSchema } from './sheet.ts'

export const reasonSchema = z.object({ rule: z.string(), text: z.string(), cells: z.array(z.string()) })

const pointSchema = z.tuple([z.number(), z.number()])

export const pageCellSchema = z.object({
  value: valueSchema,
  unit: z.string().nullable(),
  state: z.enum(['clear', 'in doubt']),
  candidates: z.array(candidateSchema),
  reasons: z.array(reasonSchema),
  /** Corners in pixels of the photo as it is looked at, clockwise from the upper left. */
  quad: z.array(pointSchema).length(4),
})
export type PageCell = z.infer<typeof pageCellSchema>

/** Layout millimetres to photo pixels (shared/reading/geometry/page-map.ts). */
export const pageMapSchema = z.object({
  homography: z.array(z.number()).length(9),
  mesh: z.object({
    step_mm: z.number(),
    columns: z.number().int(),
    rows: z.number().int(),
    dx_mm: z.array(z.number()),
    dy_mm: z.array(z.number()),
  }),
})

export const pageReadingSchema = z.object({
  file: z.string(),
  /** From 1. */
  page: z.number().int(),
  /** The sheet's code. */
  sheet: z.string().nullable(),
  layout: z.string().nullable(),
  version: z.number().int().nullable(),
  takeAgain: z.object({ code: z.string(), advice: z.string() }).nullable(),
  readings: z.record(z.string(), pageCellSchema),
  /** Computed from the readings alone: what needs a register is null and says so. Null when nothing was read. */
  results: z.record(z.string(), resultSchema.omit({ budget: true })).nullable(),
  /** Milliseconds by stage, and their total. */
  ms: z.record(z.string(), z.number()),
})

/** The same with what the worker keeps besides. */
export const storedPageReadingSchema = pageReadingSchema.extend({
  planned: z.boolean(),
  /** Lines of the typed block, as recognised; empty on a blank sheet. */
  planText: z.array(z.string()),
  /** Null when the page was not placed. */
  transform: pageMapSchema.nullable(),
  quality: z
    .object({
      px_per_mm: z.number(),
      edge_mm: z.number().nullable(),
      foundShare: z.number(),
      corners: z.number().int(),
      paper: z.number(),
    })
    .nullable(),
})
export type PageReading = z.infer<typeof storedPageReadingSchema>

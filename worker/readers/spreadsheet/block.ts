/** One run of a spreadsheet form, as it stands in `pages.block` until the page is taken in. */
import { z } from 'zod'
import { candidateSchema, valueSchema } from '../../../shared/schemas/sheet.ts'

export const blockValueSchema = z.object({
  value: valueSchema,
  unit: z.string().nullable(),
  state: z.enum(['clear', 'in doubt']),
  candidates: z.array(candidateSchema),
  reasons: z.array(z.object({ rule: z.string(), text: z.string(), cells: z.array(z.string()) })),
  /** Where it stands in the file: "Runs!D14", "row 3, column 7". */
  cellRef: z.string(),
  /** What was typed, as text: nothing that was typed is lost. */
  raw: z.string().nullable(),
})
export type BlockValue = z.infer<typeof blockValueSchema>

export const blockSchema = z.object({
  /** Counts the runs of the file from 1: the page's number. */
  number: z.number().int(),
  layout: z.string(),
  version: z.number().int(),
  /** As printed on a planned sheet, checked; null for an unplanned run. */
  sheetCode: z.string().nullable(),
  /** The plan knows the head of this sheet, so its empty head cells say nothing. */
  planned: z.boolean(),
  values: z.record(z.string(), blockValueSchema),
  /** What is wrong with the run as a whole, in plain sentences. */
  problems: z.array(z.string()),
})
export type Block = z.infer<typeof blockSchema>

/** A file that is a spreadsheet, but not one of ours: the reason is shown to whoever sent it. */
export type SpreadsheetReading = { kind: 'blocks'; blocks: Block[] } | { kind: 'not a form'; reason: string }

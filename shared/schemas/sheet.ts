/** A sheet, its readings and its doubts, as the desk sees them. */
import { z } from 'zod'
import { idSchema } from './user.ts'

export const SHEET_STATES = [
  'printed',
  'arrived',
  'being read',
  'waiting',
  'sent back',
  'settled',
  'entered',
  'challenged',
  'set aside',
  'unreadable',
] as const
export const sheetStateSchema = z.enum(SHEET_STATES)
export type SheetState = z.infer<typeof sheetStateSchema>

export const SEVERITIES = ['stop', 'doubt', 'note'] as const
export const severitySchema = z.enum(SEVERITIES)
export type Severity = z.infer<typeof severitySchema>

/** number in the stored unit, HH:MM, YYYY-MM-DD, option, tick; null = on the sheet, but blank. */
export const valueSchema = z.union([z.number(), z.string(), z.boolean(), z.null()])
export type Value = z.infer<typeof valueSchema>
export type Values = Record<string, Value>

export const ORIGINS = ['ink', 'spreadsheet', 'person', 'plan'] as const
export const originSchema = z.enum(ORIGINS)
export type Origin = z.infer<typeof originSchema>

export const SETTLEMENTS = ['kept', 'corrected', 'unreadable', 'blank on purpose'] as const
export const settlementSchema = z.enum(SETTLEMENTS)
export type Settlement = z.infer<typeof settlementSchema>

export const candidateSchema = z.object({
  value: valueSchema,
  /** Posterior with the sums; `ink`: by the ink alone. */
  p: z.number(),
  ink: z.number().optional(),
})
export type Candidate = z.infer<typeof candidateSchema>

export const readingSchema = z.object({
  key: z.string(),
  value: valueSchema,
  unit: z.string().nullable(),
  state: z.enum(['clear', 'in doubt']),
  origin: originSchema,
  candidates: z.array(candidateSchema),
  /** Why the reader doubts it, in plain sentences. Rules add their own as doubts. */
  reasons: z.array(z.object({ rule: z.string(), text: z.string(), cells: z.array(z.string()) })),
  /** The page whose picture shows its ink; null where a person or the plan gave it. */
  pageId: idSchema.nullable(),
  /** The spreadsheet cell it came from, such as "Sheet!C14". */
  cellRef: z.string().nullable(),
  settlement: settlementSchema.nullable(),
  settledBy: z.string().nullable(),
  settledAt: z.string().nullable(),
  why: z.string().nullable(),
  /** What the reader read before a person changed it. */
  readValue: valueSchema,
})
export type Reading = z.infer<typeof readingSchema>

export const doubtSchema = z.object({
  id: idSchema,
  rule: z.string(),
  ruleVersion: z.number().int(),
  severity: severitySchema,
  cells: z.array(z.string()),
  text: z.string(),
  compared: z.record(z.string(), z.union([z.number(), z.string(), z.null()])),
  /** kept: a person let it stand, with the reason. */
  settledBy: z.string().nullable(),
  settledAt: z.string().nullable(),
  why: z.string().nullable(),
})
export type Doubt = z.infer<typeof doubtSchema>

const heldSchema = z.object({ userId: idSchema, name: z.string(), since: z.string() }).nullable()

export const sheetRowSchema = z.object({
  id: idSchema,
  code: z.string().nullable(),
  /** The file it first came in, by which a sheet without a code is told apart; null where there is a code, or no file. */
  fileName: z.string().nullable(),
  state: sheetStateSchema,
  layout: z.string().nullable(),
  origin: z.enum(['photo', 'spreadsheet', 'keyed']).nullable(),
  arrivedAt: z.string().nullable(),
  demonstrator: z.string().nullable(),
  place: z.string().nullable(),
  tractor: z.string().nullable(),
  implement: z.string().nullable(),
  trialDate: z.string().nullable(),
  runNumber: z.number().int().nullable(),
  openDoubts: z.number().int(),
  stops: z.number().int(),
  /** The first thing that waits, as a sentence. */
  why: z.string().nullable(),
  /** The demonstrator answered what was sent back. */
  answered: z.boolean(),
  inHand: heldSchema,
  recordNumber: z.number().int().nullable(),
  version: z.number().int(),
})
export type SheetRow = z.infer<typeof sheetRowSchema>

export const pageSchema = z.object({
  id: idSchema,
  number: z.number().int(),
  uploadId: idSchema,
  fileName: z.string(),
  /** Flattened page in layout millimetres (/api/pages/ID/picture), or only the original (/api/pages/ID/original). */
  flattened: z.boolean(),
  takeAgain: z.object({ code: z.string(), advice: z.string() }).nullable(),
  /** Corners a person set, clockwise from the sheet's upper left, in pixels of the upright picture. */
  placedCorners: z.array(z.tuple([z.number(), z.number()])).nullable(),
})
export type Page = z.infer<typeof pageSchema>

export const historySchema = z.object({
  at: z.string(),
  who: z.string(),
  action: z.string(),
  text: z.string(),
  key: z.string().nullable(),
})
export type History = z.infer<typeof historySchema>

/** Everything the desk needs; results and doubts are recomputed in the browser by the same shared code while typing. */
export const sheetSchema = sheetRowSchema.extend({
  layoutVersion: z.number().int().nullable(),
  planned: z.boolean(),
  pages: z.array(pageSchema),
  readings: z.array(readingSchema),
  doubts: z.array(doubtSchema),
  /** Facts from registers and plan, as shared/trial wants them. */
  facts: z.record(z.string(), z.unknown()),
  sentBackReason: z.string().nullable(),
  reason: z.string().nullable(),
  history: z.array(historySchema),
})
export type Sheet = z.infer<typeof sheetSchema>

/** Every write names the version it was made on: a stale one is refused with what changed (412). */
const onVersion = z.object({ version: z.number().int() })
const whySchema = z.string().trim().max(500)

export const settleReadingSchema = onVersion.extend({
  key: z.string().max(60),
  how: settlementSchema,
  value: valueSchema.optional(),
  /** Mandatory for a changed value. */
  why: whySchema.default(''),
})
export type SettleReading = z.infer<typeof settleReadingSchema>

export const settleDoubtSchema = onVersion.extend({ doubtId: idSchema, why: whySchema.default('') })
export type SettleDoubt = z.infer<typeof settleDoubtSchema>
export const unsettleSchema = onVersion.extend({ key: z.string().max(60).optional(), doubtId: idSchema.optional() })
export type Unsettle = z.infer<typeof unsettleSchema>
export const sendBackSchema = onVersion.extend({
  reason: whySchema.min(3),
  cells: z.array(z.string().max(60)).max(100).default([]),
})
export type SendBack = z.infer<typeof sendBackSchema>
export const setAsideSchema = onVersion.extend({ reason: whySchema.min(3) })
export type SetAside = z.infer<typeof setAsideSchema>
/** Take up again what was set aside or sent back. */
export const onVersionSchema = onVersion
/** `answer`: what the clerk answers to a challenge; needed for a challenged sheet, kept in the trail. */
export const enterSheetSchema = onVersion.extend({ answer: whySchema.default('') })
export type EnterSheet = z.input<typeof enterSheetSchema>
export const enteredSchema = z.object({ recordNumber: z.number().int(), version: z.number().int(), next: idSchema.nullable() })
export type Entered = z.infer<typeof enteredSchema>
/** A picture the reader could not place: four corners of the page in picture pixels (clockwise from the sheet's top left), or keyed beside it. */
export const placeSheetSchema = onVersion.extend({
  layout: z.string().max(40),
  layoutVersion: z.number().int(),
  sheetCode: z.string().max(20).nullable(),
  corners: z
    .array(z.tuple([z.number(), z.number()]))
    .length(4)
    .nullable(),
})
export type PlaceSheet = z.infer<typeof placeSheetSchema>

export const listSheetsSchema = z.object({
  state: sheetStateSchema.optional(),
  /** desk = everything a clerk has to do. */
  desk: z.coerce.boolean().optional(),
  search: z.string().trim().max(60).optional(),
  after: z.string().max(200).optional(),
})
export type ListSheets = z.infer<typeof listSheetsSchema>
export const sheetListSchema = z.object({ sheets: z.array(sheetRowSchema), next: z.string().nullable() })

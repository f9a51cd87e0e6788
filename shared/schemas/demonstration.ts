/** A demonstration is a day at a place; its trials pair a tractor with an implement on a plot; a run is one working on one sheet. */
import { z } from 'zod'
import { idSchema, nameSchema } from './user.ts'

export const RUNS_MAX = 12
export const TRIALS_MAX = 24

export const farmerSchema = z.object({
  name: nameSchema,
  phone: z.string().trim().max(30).default(''),
  /** Where the leaf goes. */
  email: z.union([z.literal(''), z.email('An e-mail address has the form name@place.example.')]).optional(),
})

export const saveTrialSchema = z.object({
  tractorId: idSchema,
  implementId: idSchema,
  kitId: idSchema,
  plot: nameSchema,
  /** Key of the sheet its runs are written on; the usual one where none is named. */
  layout: z.string().min(1).max(40).optional(),
  runs: z.coerce.number().int().min(1).max(RUNS_MAX),
})
export type SaveTrial = z.infer<typeof saveTrialSchema>

export const saveDemonstrationSchema = z.object({
  heldOn: z.iso.date(),
  placeId: idSchema,
  /** An admin plans for anybody; a demonstrator only for themselves. */
  demonstratorId: idSchema,
  driver: z.string().trim().max(120).default(''),
  farmer: farmerSchema,
  trials: z.array(saveTrialSchema).min(1).max(TRIALS_MAX),
})
export type SaveDemonstration = z.infer<typeof saveDemonstrationSchema>

export const runSchema = z.object({
  id: idSchema,
  number: z.number().int(),
  sheetId: idSchema.nullable(),
  sheetCode: z.string().nullable(),
  sheetState: z.string().nullable(),
  recordNumber: z.number().int().nullable(),
})

export const trialSchema = z.object({
  id: idSchema,
  plot: z.string(),
  layout: z.string(),
  tractor: z.object({ id: idSchema, number: z.number(), name: z.string() }),
  implement: z.object({ id: idSchema, number: z.number(), name: z.string() }),
  kit: z.object({ id: idSchema, number: z.number(), name: z.string() }),
  runs: z.array(runSchema),
})
export type Trial = z.infer<typeof trialSchema>

export const demonstrationSchema = z.object({
  id: idSchema,
  heldOn: z.iso.date(),
  place: z.object({ id: idSchema, number: z.number(), name: z.string(), district: z.string() }),
  demonstrator: z.object({ id: idSchema, number: z.number(), name: z.string() }),
  driver: z.string(),
  /** null once consent is withdrawn and the name is erased. */
  farmer: farmerSchema.nullable(),
  trials: z.array(trialSchema),
  version: z.number().int(),
})
export type Demonstration = z.infer<typeof demonstrationSchema>

export const demonstrationRowSchema = demonstrationSchema
  .pick({ id: true, heldOn: true, place: true, demonstrator: true })
  .extend({ trials: z.number().int(), runs: z.number().int(), sheetsArrived: z.number().int(), records: z.number().int() })
export type DemonstrationRow = z.infer<typeof demonstrationRowSchema>

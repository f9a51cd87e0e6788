/** The registers: what a sheet names by number, and what the rules need to know about it. */
import { z } from 'zod'
import { OPERATIONS } from '../trial/facts.ts'
import { idSchema, nameSchema, numberSchema } from './user.ts'

const optionalText = z.string().trim().max(200).default('')
const dateSchema = z.iso.date()
const positive = (max: number) => z.coerce.number().positive().max(max)

/** A cell that may be left blank: blank is null, not 0. */
const blankable = (min: number, max: number) =>
  z.preprocess((value) => (value === '' ? null : value), z.union([z.null(), z.coerce.number().min(min).max(max)])).optional()

/** "L1 2.1, L2 3.4": the speed in each gear, km/h at rated engine speed. */
const gearSpeedsSchema = z
  .string()
  .trim()
  .max(400)
  .regex(/^([LMH]?\d \d+(\.\d+)?(, [LMH]?\d \d+(\.\d+)?)*)?$/, 'Written as L1 2.1, L2 3.4: gear and km/h.')
  .optional()

const registered = { id: idSchema, active: z.boolean(), version: z.number().int() }

export const savePlaceSchema = z.object({
  number: numberSchema,
  name: nameSchema,
  district: nameSchema,
  lat: blankable(-90, 90),
  lon: blankable(-180, 180),
  density15_kgm3: blankable(780, 900),
  active: z.boolean().default(true),
})
export const placeSchema = savePlaceSchema.extend(registered)
export type SavePlace = z.infer<typeof savePlaceSchema>
export type Place = z.infer<typeof placeSchema>

export const DRIVES = ['2WD', '4WD'] as const
export const saveTractorSchema = z.object({
  number: numberSchema,
  name: nameSchema,
  serial: nameSchema,
  ratedPower_kw: positive(450),
  ptoPower_kw: positive(400),
  ratedRpm: z.coerce.number().int().min(800).max(3500),
  drive: z.enum(DRIVES),
  hourMeterKind: z.enum(['electronic', 'mechanical']),
  tyreFront: optionalText,
  tyreRear: optionalText,
  rollingCircumference_m: blankable(1, 8),
  gearSpeeds: gearSpeedsSchema,
  ballastFront_kg: z.coerce.number().min(0).max(3000).default(0),
  ballastRear_kg: z.coerce.number().min(0).max(3000).default(0),
  active: z.boolean().default(true),
})
export const tractorSchema = saveTractorSchema.extend(registered)
export type SaveTractor = z.infer<typeof saveTractorSchema>
export type Tractor = z.infer<typeof tractorSchema>

export const operationSchema = z.enum(OPERATIONS)
export type Operation = z.infer<typeof operationSchema>
export const saveImplementSchema = z.object({
  number: numberSchema,
  name: nameSchema,
  operation: operationSchema,
  ratedWidth_m: z.coerce.number().min(0.2).max(12),
  toolCount: z.coerce.number().int().min(1).max(60),
  /** 0: it does not work the soil. */
  maxDepth_cm: z.coerce.number().min(0).max(80),
  active: z.boolean().default(true),
})
export const implementSchema = saveImplementSchema.extend(registered)
export type SaveImplement = z.infer<typeof saveImplementSchema>
export type Implement = z.infer<typeof implementSchema>

export const saveKitSchema = z.object({
  number: numberSchema,
  name: nameSchema,
  jarSerial: nameSchema,
  jarCapacity_ml: z.coerce.number().int().min(500).max(20_000),
  jarMark_ml: z.coerce.number().int().min(10).max(1000),
  jugSerial: nameSchema,
  jugCapacity_ml: z.coerce.number().int().min(100).max(5000),
  jugMark_ml: z.coerce.number().int().min(10).max(500),
  tapeSerial: optionalText,
  gaugeSerial: optionalText,
  ruleLength_cm: positive(100).default(30),
  scale_pct: blankable(0.05, 5),
  checkedOn: dateSchema,
  active: z.boolean().default(true),
})
export const kitSchema = saveKitSchema.extend(registered)
export type SaveKit = z.infer<typeof saveKitSchema>
export type Kit = z.infer<typeof kitSchema>

/** The registers that are edited as plain rows. People have their own screens: they sign in. */
export const REGISTERS = {
  places: { save: savePlaceSchema, row: placeSchema },
  tractors: { save: saveTractorSchema, row: tractorSchema },
  implements: { save: saveImplementSchema, row: implementSchema },
  kits: { save: saveKitSchema, row: kitSchema },
} as const
export const REGISTER_NAMES = ['places', 'tractors', 'implements', 'kits'] as const
export const registerNameSchema = z.enum(REGISTER_NAMES)
export type RegisterName = z.infer<typeof registerNameSchema>
export interface RegisterRows {
  places: Place
  tractors: Tractor
  implements: Implement
  kits: Kit
}

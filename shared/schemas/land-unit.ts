/** Local units of land: what a person who knows the district said one holds. */
import { z } from 'zod'
import { idSchema, nameSchema } from './user.ts'

export const saveLandUnitSchema = z.object({
  name: nameSchema,
  district: nameSchema,
  size_m2: z.coerce.number().positive().max(1_000_000),
  /** Who said so, or where it is written. */
  source: z.string().trim().min(3).max(300),
})
export type SaveLandUnit = z.infer<typeof saveLandUnitSchema>

export const landUnitSchema = saveLandUnitSchema.extend({ id: idSchema, confirmedBy: z.string(), confirmedAt: z.string() })
export type LandUnitRow = z.infer<typeof landUnitSchema>

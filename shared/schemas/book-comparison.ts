/** A comparison out of the trial book: which runs, on what footing, what may be said, and what was left out. */
import { z } from 'zod'
import { analysisSchema } from './comparison.ts'

/** What can be compared. Depth and soil moved are figures of their own, and stand beside the fuel. */
export const COMPARED_FIGURES = [
  'l_per_ha',
  'l_per_h',
  'ml_per_m3',
  'l_per_acre',
  'depth_mean_cm',
  'efc_ha_h',
  'speed_km_h',
  'slip_pct',
] as const
export const comparedFigureSchema = z.enum(COMPARED_FIGURES)
export type ComparedFigure = z.infer<typeof comparedFigureSchema>

export const COMPARED_THINGS = ['tractor', 'implement', 'gear', 'soil'] as const
export const comparedThingSchema = z.enum(COMPARED_THINGS)
export type ComparedThing = z.infer<typeof comparedThingSchema>

/** What narrows the runs; each holds the values to keep, none means all. */
export const COMPARISON_FILTERS = ['tractor', 'implement', 'operation', 'gear', 'soil', 'region', 'season'] as const
export type ComparisonFilter = (typeof COMPARISON_FILTERS)[number]

/** Several values of one filter in one parameter: names hold no bar. */
export const FILTER_SEPARATOR = '|'
const listSchema = z
  .string()
  .max(2000)
  .default('')
  .transform((text) => text.split(FILTER_SEPARATOR).filter((part) => part !== ''))

export const comparisonQuerySchema = z.object({
  figure: comparedFigureSchema.default('l_per_ha'),
  of: comparedThingSchema.default('tractor'),
  /** The gap worth seeing, in the figure's unit; the ± of a run when not told. */
  gap: z.coerce.number().positive().optional(),
  tractor: listSchema,
  implement: listSchema,
  operation: listSchema,
  gear: listSchema,
  soil: listSchema,
  region: listSchema,
  season: listSchema,
})
export type ComparisonQuery = z.infer<typeof comparisonQuerySchema>

const choiceSchema = z.object({ value: z.string(), words: z.string(), runs: z.number().int() })
export type Choice = z.infer<typeof choiceSchema>

const shownFigureSchema = z.object({ value: z.number(), U: z.number().nullable() })

export const comparedRunSchema = z.object({
  number: z.number().int(),
  treatment: z.string(),
  /** The plot or day it shares with others; null where it stands alone. */
  block: z.string().nullable(),
  trialDate: z.string().nullable(),
  place: z.string(),
  region: z.string(),
  season: z.string(),
  tractor: z.string(),
  implement: z.string(),
  gear: z.string().nullable(),
  soil: z.string().nullable(),
  /** By their keys; a figure that is not there is left away. */
  figures: z.record(z.string(), shownFigureSchema),
  /** Fuel per hour to expect, and on what ground; null where nothing is known. */
  expected: z.object({ from: z.number(), to: z.number(), ground: z.string() }).nullable(),
  /** Why it is not in the comparison; null where it is. */
  leftOut: z.string().nullable(),
  /** It was taken out by a person, who can put it back. */
  excluded: z.boolean(),
})
export type ComparedRun = z.infer<typeof comparedRunSchema>

const intervalSchema = z.tuple([z.number(), z.number()])
export const gapSchema = z.object({ first: z.string(), second: z.string(), difference: z.number(), interval: intervalSchema })
export type Gap = z.infer<typeof gapSchema>

/** The same runs by another figure: means, and the gaps where the design carries them. */
export const besideSchema = z.object({
  key: comparedFigureSchema,
  label: z.string(),
  unit: z.string(),
  means: z.array(z.object({ treatment: z.string(), n: z.number().int(), mean: z.number() })),
  gaps: z.array(gapSchema),
})
export type Beside = z.infer<typeof besideSchema>

export const claimSchema = z.object({
  may: z.boolean(),
  /** One sentence; the figure stands in its band between the two. */
  before: z.string(),
  figure: z.string(),
  after: z.string(),
  /** Why it may, or may not, be said. */
  because: z.array(z.string()),
  mayNot: z.string(),
})
export type Claim = z.infer<typeof claimSchema>

export const bookComparisonSchema = z.object({
  figure: comparedFigureSchema,
  label: z.string(),
  unit: z.string(),
  of: comparedThingSchema,
  choices: z.record(z.enum(COMPARISON_FILTERS), z.array(choiceSchema)),
  runs: z.array(comparedRunSchema),
  /** Median expanded uncertainty (k = 2) of the runs compared; null where none is known. */
  runU: z.number().nullable(),
  analysis: analysisSchema.nullable(),
  /** In place of an analysis: why there is none. */
  whyNot: z.string().nullable(),
  /** What makes the intervals less sure than they look; null where nothing does. */
  warning: z.string().nullable(),
  beside: z.array(besideSchema),
  claim: claimSchema,
})
export type BookComparison = z.infer<typeof bookComparisonSchema>

const reasonSchema = z.string().trim().min(3).max(500)
export const excludeSchema = z.object({ number: z.coerce.number().int().positive(), reason: reasonSchema })
export type Exclude = z.infer<typeof excludeSchema>

/** A line of the log: nothing of it is ever changed, taking back is a line of its own. */
export const exclusionLineSchema = z.object({
  number: z.number().int(),
  act: z.enum(['left out', 'taken back']),
  reason: z.string(),
  by: z.string(),
  at: z.string(),
})
export type ExclusionLine = z.infer<typeof exclusionLineSchema>
export const exclusionLogSchema = z.object({ lines: z.array(exclusionLineSchema) })

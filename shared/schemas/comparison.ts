/** A comparison of treatments (tractors, implements, gears): what the data support, and what may be said of them. */
import { z } from 'zod'

export const DESIGNS = ['paired', 'blocks', 'one factor'] as const
export const designKindSchema = z.enum(DESIGNS)
export type DesignKind = z.infer<typeof designKindSchema>

const figure = z.number()
/** From and to, in the unit of the response. */
const intervalSchema = z.tuple([figure, figure])
export type Interval = z.infer<typeof intervalSchema>

/** The runs of one treatment by themselves. */
export const groupSchema = z.object({
  treatment: z.string(),
  n: z.number().int(),
  mean: figure,
  /** With n − 1; null for a single run. */
  sd: figure.nullable(),
  /** 1 − α interval of the mean by this group's own spread; null for a single run. */
  interval: intervalSchema.nullable(),
})
export type Group = z.infer<typeof groupSchema>

/** A line of the table of squares. With empty cells each source is what it adds to the other (marginal). */
export const squaresRowSchema = z.object({
  source: z.string(),
  df: figure,
  ss: figure,
  ms: figure,
  f: figure.nullable(),
  p: figure.nullable(),
})
export type SquaresRow = z.infer<typeof squaresRowSchema>

/** A t test of first − second. `n` counts pairs in a paired test, else runs; `sd` is that of the gaps, or pooled. */
export const tTestSchema = z.object({
  method: z.enum(['paired t', 'Welch t', 'pooled t']),
  first: z.string(),
  second: z.string(),
  n: z.number().int(),
  difference: figure,
  sd: figure.nullable(),
  se: figure,
  t: figure,
  df: figure,
  p: figure,
  interval: intervalSchema,
})
export type TTest = z.infer<typeof tTestSchema>

/** first − second by the model's pooled error: alone (t), among all pairs (Tukey), and stepped down (Holm). */
export const pairSchema = z.object({
  first: z.string(),
  second: z.string(),
  difference: figure,
  se: figure,
  t: figure,
  df: figure,
  p: figure,
  pTukey: figure,
  pHolm: figure,
  interval: intervalSchema,
  tukeyInterval: intervalSchema,
})
export type Pair = z.infer<typeof pairSchema>

/** Grubbs' test of a treatment's farthest value; shown, never acted on. */
export const grubbsSchema = z.object({
  treatment: z.string(),
  id: z.string(),
  value: figure,
  n: z.number().int(),
  g: figure,
  critical: figure,
  beyond: z.boolean(),
})
export type Grubbs = z.infer<typeof grubbsSchema>
export const robustSchema = z.object({ treatment: z.string(), id: z.string(), value: figure, z: figure })
export type Robust = z.infer<typeof robustSchema>

/** How many a treatment needs to see a gap of this size. `n` null: more than the search goes to. */
export const neededSchema = z.object({ gap: figure, n: z.number().int().nullable() })
export type Needed = z.infer<typeof neededSchema>

export const leftOutSchema = z.object({ id: z.string(), reason: z.string() })
export type LeftOut = z.infer<typeof leftOutSchema>

export const analysisSchema = z.object({
  design: z.object({
    kind: designKindSchema,
    why: z.string(),
    response: z.string(),
    treatment: z.string(),
    block: z.string().nullable(),
    alpha: figure,
    /** In order of first appearance: a difference is first − second. */
    treatments: z.array(z.string()),
    blocks: z.array(z.string()),
    n: z.number().int(),
  }),
  groups: z.array(groupSchema),
  squares: z.array(squaresRowSchema).nullable(),
  rSquared: figure.nullable(),
  residualSd: figure.nullable(),
  /** Welch's F, which lets the spreads differ, beside the classical one. */
  welchF: z.object({ f: figure, df1: figure, df2: figure, p: figure }).nullable(),
  tests: z.array(tTestSchema),
  pairwise: z.array(pairSchema),
  /** Least significant difference: only where F is significant and every pair has the same error. */
  lsd: figure.nullable(),
  /** Tukey's honest difference: where every pair has the same error. */
  hsd: figure.nullable(),
  replicates: z.object({
    unit: z.enum(['pairs', 'blocks', 'runs a treatment']),
    power: figure,
    sd: figure,
    method: z.string(),
    needed: z.array(neededSchema),
  }),
  outliers: z.object({ alpha: figure, grubbs: z.array(grubbsSchema), robust: z.array(robustSchema) }),
  leftOut: z.array(leftOutSchema),
})
export type Analysis = z.infer<typeof analysisSchema>

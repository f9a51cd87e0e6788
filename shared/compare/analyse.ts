/** The one door of the comparison: observations and a design in, everything that is said of them out. Pure. */
import { UserError } from '../errors.ts'
import type { Analysis, DesignKind, Group, LeftOut } from '../schemas/comparison.ts'
import { mean, standardDeviation } from '../trial/stats.ts'
import { fitBlocks } from './blocks.ts'
import { tCritical } from './distributions.ts'
import type { Fit } from './fit.ts'
import { ALPHA, byTreatment, inOrder, type Observation, valuesOf } from './observations.ts'
import { fitOneFactor, twoSampleTests, welchF } from './one-factor.ts'
import { outliersOf } from './outliers.ts'
import { pairedTest } from './paired.ts'
import { comparePairs, leastDifferences } from './pairwise.ts'
import { METHOD, neededFor, POWER } from './replicates.ts'

export interface Question {
  kind: DesignKind
  /** Why this design, in one sentence. */
  why: string
  /** What the columns are called where they come from. */
  names: { response: string; treatment: string; block: string | null }
  /** Gaps worth seeing, in the unit of the response; a twentieth and a tenth of the mean when not told. */
  gaps?: readonly number[]
  /** Runs that did not come this far. */
  leftOut?: readonly LeftOut[]
}

/** @throws UserError `not_accepted` where the values do not carry the design, saying what is missing */
export function analyse(observations: readonly Observation[], question: Question): Analysis {
  const { kind, names } = question
  if (observations.length === 0) throw new UserError('not_accepted', 'There is no value to compare.')
  const block = names.block ?? 'block'
  if (kind === 'paired') {
    const { test, kept, leftOut } = pairedTest(observations, { treatment: names.treatment, block })
    return assemble(kept, question, {
      tests: [test],
      sd: test.sd!,
      leftOut: [...(question.leftOut ?? []), ...leftOut],
    })
  }
  const fit =
    kind === 'blocks'
      ? fitBlocks(observations, { treatment: names.treatment, block })
      : fitOneFactor(observations, { treatment: names.treatment })
  const pairwise = comparePairs(fit)
  return assemble(observations, question, {
    ...fromFit(fit),
    ...leastDifferences(fit, pairwise),
    tests: kind === 'one factor' ? twoSampleTests(observations, fit) : [],
    welchF: kind === 'one factor' ? welchF(observations) : null,
    pairwise,
    sd: Math.sqrt(fit.ms),
    leftOut: [...(question.leftOut ?? [])],
  })
}

const fromFit = (fit: Fit) => ({ squares: fit.squares, rSquared: fit.rSquared, residualSd: Math.sqrt(fit.ms) })

const UNITS = { paired: 'pairs', blocks: 'blocks', 'one factor': 'runs a treatment' } as const

type Made = Pick<Analysis, 'tests' | 'leftOut'> & Partial<Analysis> & { sd: number }

function assemble(observations: readonly Observation[], question: Question, { sd, ...made }: Made): Analysis {
  const { kind, why, names } = question
  const treatments = inOrder(observations.map((o) => o.treatment))
  const size = Math.abs(mean(valuesOf(observations)))
  const gaps = question.gaps ?? [size / 20, size / 10]
  const unit = UNITS[kind]
  return {
    design: {
      kind,
      why,
      ...names,
      alpha: ALPHA,
      treatments,
      blocks: kind === 'one factor' ? [] : inOrder(observations.map((o) => o.block ?? '')),
      n: observations.length,
    },
    groups: groupsOf(observations),
    squares: null,
    rSquared: null,
    residualSd: null,
    welchF: null,
    pairwise: [],
    lsd: null,
    hsd: null,
    ...made,
    replicates: {
      unit,
      power: POWER,
      sd,
      method: METHOD,
      needed: gaps.map((gap) => neededFor(gap, sd, unit, treatments.length)),
    },
    outliers: outliersOf(observations),
  }
}

/** Each treatment by itself: n, mean, spread, and the interval its own spread allows. */
export function groupsOf(observations: readonly Observation[]): Group[] {
  return [...byTreatment(observations)].map(([treatment, group]) => {
    const values = valuesOf(group)
    const centre = mean(values)
    const sd = standardDeviation(values)
    const n = values.length
    const half = sd === null ? null : (tCritical(ALPHA, n - 1) * sd) / Math.sqrt(n)
    return { treatment, n, mean: centre, sd, interval: half === null ? null : [centre - half, centre + half] }
  })
}

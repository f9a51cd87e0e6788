/** Runs of the trial book into a comparison: what may stand in it, on which footing, what is shown beside it. */
import { analyse, groupsOf } from '../../../shared/compare/analyse.ts'
import { claimOf, noClaim } from '../../../shared/compare/claim.ts'
import { gapsOf } from '../../../shared/compare/gaps.ts'
import { inOrder } from '../../../shared/compare/observations.ts'
import { type Candidate, type Proposal, proposeDesign } from '../../../shared/compare/propose-design.ts'
import { UserError } from '../../../shared/errors.ts'
import type {
  Beside,
  BookComparison,
  ComparedFigure,
  ComparedRun,
  ComparedThing,
  ComparisonQuery,
} from '../../../shared/schemas/book-comparison.ts'
import type { Analysis } from '../../../shared/schemas/comparison.ts'
import { RESULTS } from '../../../shared/trial/result.ts'
import { median } from '../../../shared/trial/stats.ts'
import type { ComparableRun } from '../../db/desk/comparable-runs.ts'
import { expectedBand } from './expected-band.ts'
import { choicesIn, dayWords, narrowed, seasonOf, treatmentsBy } from './narrow-runs.ts'
import { settingOf } from './setting.ts'

/** Shown beside every comparison: shallow work is no saving. */
const BESIDE: readonly ComparedFigure[] = ['l_per_ha', 'depth_mean_cm', 'ml_per_m3', 'l_per_h']
const MOST_TREATMENTS = 20

/** The figures a comparison reads of each run. */
export const figuresFor = (figure: ComparedFigure): ComparedFigure[] => [...new Set([figure, ...BESIDE])]
export const EXPECTED = 'expected_l_per_h'

/** Compares the runs of `book` that the query keeps. Pure; the arithmetic is shared/compare's, the same as that of `npm run compare`. */
export function compareRuns(book: readonly ComparableRun[], query: ComparisonQuery): BookComparison {
  const { figure, of } = query
  const keys = figuresFor(figure)
  const ask: Ask = { ...query, treatmentOf: treatmentsBy(of, book) }
  const chosen = narrowed(book, query)
  const { label, unit } = RESULTS[figure]
  const fit = chosen.filter((run) => refusalOf(run, ask) === null)
  const proposal = proposeDesign(candidatesOf(fit, ask), of)
  const reasons = new Map(proposal.leftOut.map(({ id, reason }) => [id, reason]))
  const compared = fit.filter((run) => !reasons.has(String(run.number)))
  const Us = compared.flatMap((run) => run.results[figure]?.U ?? [])
  const runU = Us.length === 0 ? null : median(Us)
  const gap = query.gap ?? runU
  const made = attempt(proposal, query, gap === null ? undefined : [gap])
  const beside = keys.filter((key) => key !== figure).map((key) => besideOf(compared, proposal, query, key))
  const setting = settingOf(compared, of)
  return {
    figure,
    label,
    unit,
    of,
    choices: choicesIn(book),
    runs: chosen.map((run) => toRun(run, ask, keys, refusalOf(run, ask) ?? reasons.get(String(run.number)) ?? null, proposal)),
    runU,
    ...made,
    warning: made.analysis && proposal.warning,
    beside,
    claim: made.analysis
      ? claimOf({ figure, unit, noun: of, analysis: made.analysis, gaps: gapsOf(made.analysis), beside, runU, setting })
      : noClaim(made.whyNot),
  }
}

/** The query, and what it compares by. */
type Ask = ComparisonQuery & { treatmentOf: (run: ComparableRun) => string | null }

/** Why a run cannot be compared; null where it can. */
function refusalOf(run: ComparableRun, { figure, of, treatmentOf }: Ask): string | null {
  if (run.exclusion) return `left out by ${run.exclusion.by}: “${run.exclusion.reason}”`
  if (run.state === 'challenged') return 'challenged: its sheet is at the desk again'
  if (treatmentOf(run) === null) return `the record names no ${of}`
  const result = run.results[figure]
  if (typeof result?.value === 'number') return null
  return result?.reason?.text ?? `no ${RESULTS[figure].label}`
}

const candidatesOf = (runs: readonly ComparableRun[], { of, figure, treatmentOf }: Ask): Candidate[] =>
  runs.flatMap((run) => {
    const value = run.results[figure]?.value
    if (typeof value !== 'number') return []
    return [{ id: String(run.number), treatment: treatmentOf(run)!, value, ...sharedBy(run, of) }]
  })

/** What a run shares with others: its day and plot, with the machine that is not being compared. */
function sharedBy(run: ComparableRun, of: ComparedThing): { plot: string | null; day: string | null } {
  if (!run.place || !run.trialDate) return { plot: null, day: null }
  const tractor = of === 'tractor' ? null : run.tractor?.name
  const implement = of === 'implement' ? null : run.implement?.name
  const day = [run.place.name, dayWords(run.trialDate), tractor, implement].filter((part) => part != null).join(', ')
  return { plot: run.plot === null ? null : `${run.plot}, ${day}`, day }
}

type Made = { analysis: Analysis; whyNot: null } | { analysis: null; whyNot: string }

function attempt(proposal: Proposal, { figure, of }: ComparisonQuery, gaps: number[] | undefined): Made {
  const { kind, why, block, observations, leftOut } = proposal
  const treatments = inOrder(observations.map((o) => o.treatment))
  if (observations.length === 0) return { analysis: null, whyNot: 'No run of this choice has the figure.' }
  if (treatments.length > MOST_TREATMENTS)
    return { analysis: null, whyNot: `These are ${treatments.length} ${of}s; compare at most ${MOST_TREATMENTS} at once.` }
  if (treatments.length > 1 && observations.length === treatments.length && kind === 'one factor')
    return { analysis: null, whyNot: `One run for each ${of} shows no difference.` }
  try {
    const names = { response: figure, treatment: of, block }
    return { analysis: analyse(observations, { kind, why, names, leftOut, ...(gaps ? { gaps } : {}) }), whyNot: null }
  } catch (error) {
    if (error instanceof UserError) return { analysis: null, whyNot: error.message }
    throw error
  }
}

/** The same runs on the same footing by another figure; without gaps where it does not carry them. */
function besideOf(runs: readonly ComparableRun[], proposal: Proposal, query: ComparisonQuery, key: ComparedFigure): Beside {
  const values = new Map(runs.map((run) => [String(run.number), run.results[key]?.value]))
  const observations = proposal.observations.flatMap((o) => {
    const value = values.get(o.id)
    return typeof value === 'number' ? [{ ...o, value }] : []
  })
  const { analysis } = attempt({ ...proposal, observations }, { ...query, figure: key }, [])
  const { label, unit } = RESULTS[key]
  const means = groupsOf(observations).map(({ treatment, n, mean }) => ({ treatment, n, mean }))
  return { key, label, unit, means, gaps: analysis ? gapsOf(analysis) : [] }
}

function toRun(
  run: ComparableRun,
  { of, treatmentOf }: Ask,
  keys: readonly ComparedFigure[],
  leftOut: string | null,
  proposal: Proposal,
): ComparedRun {
  const shared = sharedBy(run, of)
  const figures = keys.flatMap((key) => {
    const { value, U } = run.results[key] ?? { value: null, U: null }
    return typeof value === 'number' ? [[key, { value, U }] as const] : []
  })
  return {
    number: run.number,
    treatment: treatmentOf(run) ?? '',
    block: proposal.block === null ? null : shared[proposal.block],
    trialDate: run.trialDate,
    place: run.place?.name ?? '',
    region: run.place?.district ?? '',
    season: seasonOf(run.trialDate),
    tractor: run.tractor?.name ?? '',
    implement: run.implement?.name ?? '',
    gear: run.gear,
    soil: run.soil,
    figures: Object.fromEntries(figures),
    expected: expectedBand(run.results[EXPECTED]?.value ?? null, run.tractor?.ptoPower_kw ?? null),
    leftOut,
    excluded: run.exclusion !== null,
  }
}

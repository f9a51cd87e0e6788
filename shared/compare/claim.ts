/**
 * The claim rule (common practice): "uses less" only if the runs were paired or in blocks on the same plots, the interval leaves
 * out zero, and the gap is wider than the ± of a run; and shallower work is no saving unless it holds for each m³ of soil too.
 */
import type { Beside, Claim, ComparedFigure, Gap } from '../schemas/book-comparison.ts'
import type { Analysis } from '../schemas/comparison.ts'
import { roundByUncertainty } from '../trial/format.ts'
import { turned } from './gaps.ts'

export interface Matter {
  figure: ComparedFigure
  unit: string
  /** What a treatment is: tractor, implement, gear, soil. */
  noun: string
  analysis: Analysis
  gaps: readonly Gap[]
  beside: readonly Beside[]
  /** Expanded uncertainty of a run (k = 2), in `unit`; null where none is known. */
  runU: number | null
  /** Where and how, as far as all runs share it: "at Kelwadi, ploughing". */
  setting: string
}

/** A gap as the tables give it, and as the sentence does: the lower one first. */
interface Seen {
  tabled: Gap
  gap: Gap
}

const FUEL: readonly ComparedFigure[] = ['l_per_ha', 'l_per_h', 'l_per_acre', 'ml_per_m3']
const FUEL_BY_AREA: readonly ComparedFigure[] = ['l_per_ha', 'l_per_acre', 'l_per_h']
const MAY_NOT =
  'in other soils, at other depths, in other gears, on other days; or as a share of fuel without the field and the day.'

/** No analysis, no claim: the reason stands in its place. */
export const noClaim = (because: string): Claim => ({
  may: false,
  before: 'No difference may be said.',
  figure: '',
  after: '',
  because: [because],
  mayNot: 'any ranking of these runs.',
})

/** One sentence of what may be said of the widest gap that may be said, or that none may. */
export function claimOf(matter: Matter): Claim {
  const judged = matter.gaps
    .map((tabled) => ({ tabled, gap: tabled.difference <= 0 ? tabled : turned(tabled) }))
    .map((seen) => ({ ...seen, objections: objectionsTo(seen, matter) }))
    .sort((a, b) => a.gap.difference - b.gap.difference)
  const best = judged.find((one) => one.objections.length === 0)
  if (best) return mayBeSaid(best, judged.length, judged.filter((one) => one.objections.length === 0).length, matter)
  const widest = judged[0]
  if (!widest) return noClaim('The runs carry no interval.')
  const { gap } = widest
  const count = matter.analysis.design.treatments.length
  const none = count > 2 ? `Between these ${count} ${matter.noun}s no difference may be said` : 'No difference may be said'
  const mixed = mixedUp(matter)
  return {
    may: false,
    // What the runs themselves cannot carry stands in the sentence: small p values beside it do not mend it.
    before: `${none}${mixed ? `, because ${mixed}` : ''}: ${gap.first} measured`,
    figure: banded(gap),
    after: `${matter.unit} less than ${gap.second}${tail(matter)}.`,
    because: widest.objections,
    mayNot: `“${FUEL.includes(matter.figure) ? 'uses less' : 'does less'}”, of any of them.`,
  }
}

function mayBeSaid({ tabled, gap }: Seen, all: number, sayable: number, matter: Matter): Claim {
  const { unit, runU, analysis } = matter
  const verb = FUEL.includes(matter.figure) ? 'used' : 'measured'
  const rest = all - sayable
  const others =
    all === 1 ? '' : ` Of ${all} pairs ${sayable === 1 ? 'this one' : `${sayable}`} may be said; for the other ${rest} nothing.`
  return {
    may: true,
    before: `On ${footing(analysis)}${matter.setting === '' ? '' : ` ${matter.setting}`}${depths(gap, matter)}, ${gap.first} ${verb}`,
    figure: banded(gap),
    after: `${unit} less than ${gap.second}.`,
    because: [
      `the ${percent(analysis)} interval of ${span(tabled)} ${unit}, leaves out zero, and the gap, ${shown(-gap.difference, gap)}, is wider than the ± of one run, ${shown(runU ?? 0, gap)}.${others}`,
    ],
    mayNot: MAY_NOT,
  }
}

/** Why this gap may not be said; empty where it may. `first` is the lower one. */
function objectionsTo({ tabled, gap }: Seen, matter: Matter): string[] {
  const { analysis, unit, runU, figure, beside } = matter
  const said: string[] = []
  const mixed = mixedUp(matter)
  if (mixed && analysis.design.kind === 'one factor') said.push(`${mixed}: nothing paired the runs or put them in blocks`)
  else if (mixed) said.push(`${mixed}: only work on the same plots carries a difference`)
  if (gap.interval[1] >= 0) said.push(`the ${percent(analysis)} interval of ${span(tabled)} ${unit}, holds zero`)
  if (runU === null) said.push('the ± of a run is not known')
  else if (-gap.difference <= runU)
    said.push(`the gap, ${shown(-gap.difference, gap)} ${unit}, is not wider than the ± of one run, ${shown(runU, gap)}`)
  const depth = FUEL_BY_AREA.includes(figure) ? besideGap(beside, 'depth_mean_cm', gap) : null
  if (depth && depth.interval[1] < 0) {
    const soil = besideGap(beside, 'ml_per_m3', gap)
    if (!soil || soil.interval[1] >= 0)
      said.push(`${gap.first} worked ${(-depth.difference).toFixed(1)} cm shallower, and for each m³ of soil it did not use less`)
  }
  return said
}

/** What the runs mix up, so that no gap between them may be said; null where they shared plots. */
function mixedUp({ analysis: { design }, noun }: Matter): string | null {
  if (design.kind === 'one factor') return `the fields differ as well as the ${noun}s`
  return design.block === 'plot' ? null : `plot and ${noun} are mixed within a ${design.block}`
}

function besideGap(beside: readonly Beside[], key: ComparedFigure, { first, second }: Gap): Gap | null {
  const gaps = beside.find((b) => b.key === key)?.gaps ?? []
  const straight = gaps.find((g) => g.first === first && g.second === second)
  const other = gaps.find((g) => g.first === second && g.second === first)
  return straight ?? (other ? turned(other) : null)
}

/** ", 15.1 cm deep against 15.2 cm" */
function depths({ first, second }: Gap, { beside, figure }: Matter): string {
  const means = figure === 'depth_mean_cm' ? [] : (beside.find((b) => b.key === 'depth_mean_cm')?.means ?? [])
  const [a, b] = [first, second].map((name) => means.find((m) => m.treatment === name)?.mean)
  return a === undefined || b === undefined ? '' : `, ${a.toFixed(1)} cm deep against ${b.toFixed(1)} cm`
}

function footing({ design, groups }: Analysis): string {
  if (design.kind === 'paired') return `${design.blocks.length} paired plots`
  if (design.kind === 'blocks') return `${design.blocks.length} shared ${design.block ?? 'block'}s`
  return `${groups.reduce((sum, g) => sum + g.n, 0)} runs on unlike fields`
}

const half = ({ interval }: Gap): number => (interval[1] - interval[0]) / 2
const percent = ({ design }: Analysis): string => `${Math.round(100 * (1 - design.alpha))} %`
/** One figure more than the band shows: these are to be checked, not spoken. */
const shown = (value: number, gap: Gap): string => roundByUncertainty(value, half(gap) / 10).value
const banded = (gap: Gap): string => {
  const { value, U } = roundByUncertainty(-gap.difference, half(gap))
  return `${value} ± ${U}`
}
/** The pair and its interval, in the direction the tables and plots give it. */
const span = (gap: Gap): string =>
  `${gap.first} − ${gap.second}, ${[...gap.interval].map((end) => shown(end, gap).replace('-', '−')).join(' to ')}`
const tail = ({ setting }: Matter): string => (setting === '' ? '' : `, ${setting}`)

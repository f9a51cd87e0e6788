/** Which design the runs support: the nearest footing they share, and why. */
import type { DesignKind, LeftOut } from '../schemas/comparison.ts'
import { linkedGroups } from './linked.ts'
import { groupedBy, inOrder, type Observation } from './observations.ts'

/** A run that may be compared, with what it shares with others. */
export interface Candidate {
  id: string
  treatment: string
  value: number
  /** The plot it was on, that day; null where no plan tells. */
  plot: string | null
  /** Place, day, and whatever else must not differ within a block; null where the day is not known. */
  day: string | null
}

export interface Proposal {
  kind: DesignKind
  why: string
  /** What a block is called; null where nothing is shared. */
  block: 'plot' | 'day' | null
  /** What makes the intervals of this design less sure than they look, in one sentence. */
  warning: string | null
  observations: Observation[]
  leftOut: LeftOut[]
}

/**
 * Same plots once each: pairs. Plots or days shared by two treatments or more: blocks. Else unlike fields.
 * @param noun what a treatment is: tractor, implement, gear, soil
 */
export function proposeDesign(candidates: readonly Candidate[], noun: string): Proposal {
  const design = designOf(candidates, noun)
  return { ...design, warning: warningOf(design, candidates, noun) }
}

type Design = Omit<Proposal, 'warning'>

function designOf(candidates: readonly Candidate[], noun: string): Design {
  const all = inOrder(candidates.map((c) => c.treatment))
  for (const level of ['plot', 'day'] as const) {
    const shared = sharedBlocks(candidates, level)
    const groups = linkedGroups(shared.kept)
    const twice = inOrder(shared.kept.map((o) => o.block!)).length > 1
    if (twice && groups.length === 1 && groups[0]!.length === all.length) return fromShared(shared, level, noun)
  }
  return {
    kind: 'one factor',
    why: unlikeWhy(linkedGroups(sharedBlocks(candidates, 'day').kept), all.length, noun),
    block: null,
    observations: candidates.map(({ id, treatment, value }) => ({ id, treatment, value, block: null })),
    leftOut: [],
  }
}

/** Runs of one trial lean on each other; and a day is not a plot: what differs between its plots looks like the treatment. */
function warningOf({ block, observations }: Design, candidates: readonly Candidate[], noun: string): string | null {
  if (block === 'day')
    return `Plot and ${noun} are mixed: within a day the ${plural(noun)} did not share their plots, as far as the plans tell, and each run of a trial counts as a value of its own.`
  const compared = new Set(observations.map((o) => o.id))
  const onPlots = candidates.filter((c) => c.plot !== null && compared.has(c.id))
  const trials = new Set(onPlots.map((c) => `${c.plot} ${c.treatment}`))
  if (trials.size === onPlots.length) return null
  return `Runs of one ${noun} on one plot lean on each other, yet each counts as a value of its own: the intervals may be too narrow.`
}

/** Where some worked side by side and others did not, it says who: choosing them alone makes a better comparison. */
function unlikeWhy(groups: readonly string[][], all: number, noun: string): string {
  const side = groups.filter((group) => group.length > 1)
  if (all < 2 || side.length === 0)
    return `These ${plural(noun)} did not share plots or days twice: their runs stand on unlike fields.`
  const who = side.map((group) => group.join(' and ')).join('; ')
  return side.length === 1 && side[0]!.length === all
    ? `These ${plural(noun)} shared one day only: their runs stand on unlike fields.`
    : `Not all of these ${plural(noun)} worked side by side, so their runs stand on unlike fields. Side by side worked: ${who}. Choose one of these groups to compare it by itself.`
}

interface Shared {
  kept: Observation[]
  alone: Observation[]
}

function sharedBlocks(candidates: readonly Candidate[], level: 'plot' | 'day'): Shared {
  const observations = candidates.map((c): Observation => ({ id: c.id, treatment: c.treatment, value: c.value, block: c[level] }))
  const kept: Observation[] = []
  const alone = observations.filter((o) => o.block === null)
  for (const members of groupedBy(
    observations.filter((o) => o.block !== null),
    (o) => o.block!,
  ).values()) {
    if (inOrder(members.map((o) => o.treatment)).length > 1) kept.push(...members)
    else alone.push(...members)
  }
  return { kept, alone }
}

function fromShared({ kept, alone }: Shared, level: 'plot' | 'day', noun: string): Design {
  const treatments = inOrder(kept.map((o) => o.treatment))
  const blocks = inOrder(kept.map((o) => o.block!))
  const cells = groupedBy(kept, (o) => `${o.block} ${o.treatment}`)
  const onceEach = treatments.length === 2 && kept.length === 2 * blocks.length && cells.size === kept.length
  const leftOut = alone.map(({ id }) => ({
    id,
    reason: level === 'plot' ? `no other ${noun} worked its plot that day` : `no other ${noun} worked there that day`,
  }))
  if (onceEach && level === 'plot') {
    const why = `Both ${plural(noun)} worked the same ${blocks.length} plots, once each: the gaps within plots are judged.`
    return { kind: 'paired', why, block: 'plot', observations: kept, leftOut }
  }
  const empty = treatments.length * blocks.length - cells.size
  const holes =
    empty > 0 ? ` ${empty} of their ${treatments.length * blocks.length} cells are empty, so least squares fits them.` : ''
  const where = level === 'plot' ? 'plots' : 'days at one place'
  return {
    kind: 'blocks',
    why: `${blocks.length} ${where} were shared by ${treatments.length > 2 ? 'two or more' : 'both'} ${plural(noun)}: each is a block, and what differs between blocks is taken out first.${holes}`,
    block: level,
    observations: kept,
    leftOut,
  }
}

const plural = (noun: string): string => `${noun}s`

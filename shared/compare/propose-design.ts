/** Which design the runs support: the nearest footing they share, and why. */
import type { DesignKind, LeftOut } from '../schemas/comparison.ts'
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
  observations: Observation[]
  leftOut: LeftOut[]
}

/**
 * Same plots once each: pairs. Plots or days shared by two treatments or more: blocks. Else unlike fields.
 * @param noun what a treatment is: tractor, implement, gear, soil
 */
export function proposeDesign(candidates: readonly Candidate[], noun: string): Proposal {
  for (const level of ['plot', 'day'] as const) {
    const shared = sharedBlocks(candidates, level)
    if (shared.kept.length === 0 || inOrder(shared.kept.map((o) => o.block!)).length < 2) continue
    if (inOrder(shared.kept.map((o) => o.treatment)).length < inOrder(candidates.map((c) => c.treatment)).length) continue
    return fromShared(shared, level, noun)
  }
  return {
    kind: 'one factor',
    why: `No two of ${plural(noun)} worked the same plots or days twice over: the runs stand on unlike fields.`,
    block: null,
    observations: candidates.map(({ id, treatment, value }) => ({ id, treatment, value, block: null })),
    leftOut: [],
  }
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

function fromShared({ kept, alone }: Shared, level: 'plot' | 'day', noun: string): Proposal {
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

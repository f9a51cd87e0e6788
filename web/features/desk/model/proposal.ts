/** What may be taken with one key: the reader's candidates, the options of a choice, yes or no. */
import type { LayoutCell } from '../../../../shared/layouts/layout.ts'
import type { Reading, Value } from '../../../../shared/schemas/sheet.ts'

export interface Offer {
  value: Value
  words: string | null
  /** Shares 0 to 1; null where the reader gives none. */
  byInk: number | null
  withSums: number | null
}

export interface Proposal {
  offers: readonly Offer[]
  /** What Enter takes; null when the ink and the sums favour different values, or nothing is proposed. */
  taken: Offer | null
  /** They favour different values: no key takes either by default. */
  split: boolean
}

const MOST = 9

export function proposalOf(cell: LayoutCell, reading: Reading): Proposal {
  const offers = offersOf(cell, reading)
  const inkFirst = best(offers, (o) => o.byInk)
  const sumsFirst = best(offers, (o) => o.withSums)
  const split = inkFirst !== null && sumsFirst !== null && inkFirst.value !== sumsFirst.value
  return { offers, taken: split ? null : sumsFirst, split }
}

function offersOf(cell: LayoutCell, reading: Reading): Offer[] {
  const read = (value: Value) => reading.candidates.find((c) => c.value === value)
  const offer = (value: Value, words: string | null): Offer => {
    const found = read(value)
    return { value, words, byInk: found?.ink ?? null, withSums: found?.p ?? null }
  }
  if (cell.kind === 'choice') return cell.options.map((o) => offer(o.option, o.label))
  if (cell.kind === 'tick') return [offer(true, 'ticked'), offer(false, 'not ticked')]
  if (cell.kind === 'signature') return [offer(true, 'signed'), offer(false, 'not signed')]
  return [...reading.candidates]
    .sort((a, b) => b.p - a.p)
    .slice(0, MOST)
    .map((c) => offer(c.value, c.value === null ? 'blank' : null))
}

function best(offers: readonly Offer[], share: (offer: Offer) => number | null): Offer | null {
  const rated = offers.filter((o) => share(o) !== null).sort((a, b) => (share(b) ?? 0) - (share(a) ?? 0))
  return rated[0] ?? null
}

/** By how much another's share by the ink must be higher before a person is said to have gone against the ink. */
const CLEARLY = 0.1

/**
 * Why a person who takes an offer changes what was read; null where they only keep it: the value stands already, and the ink
 * does not clearly say another.
 */
export function whyTaken(offer: Offer, offers: readonly Offer[], value: Value): string | null {
  const inkBest = best(offers, (o) => o.byInk)
  const againstInk = (inkBest?.byInk ?? 0) - (offer.byInk ?? 0) > CLEARLY
  if (offer.value === value && !againstInk) return null
  if (!againstInk && offer.byInk !== null) return 'by the ink'
  if (best(offers, (o) => o.withSums)?.value === offer.value) return 'by the sums'
  return 'taken from what the reader allows'
}

/** The budget of a figure: how much of its variance each part makes. */
import type { Part } from './measure.ts'

export interface BudgetLine extends Part {
  /** Share of u², 0 to 1. */
  share: number
}

/** The parts with their shares, largest first; none where nothing is unsure. */
export function sharesOf(parts: readonly Part[]): BudgetLine[] {
  const variance = parts.reduce((sum, part) => sum + part.u ** 2, 0)
  if (!(variance > 0)) return []
  return parts.map((part) => ({ ...part, share: part.u ** 2 / variance })).sort((a, b) => b.share - a.share)
}

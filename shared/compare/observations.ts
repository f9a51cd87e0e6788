/** What a comparison starts from: values, each of one treatment, perhaps in a block. */

export interface Observation {
  /** Names the run to people: a line of a file, a record number. */
  id: string
  treatment: string
  /** The plot, pair or day it shares with others; null where it stands alone. */
  block: string | null
  value: number
}

/** Level of every test here, two-sided. */
export const ALPHA = 0.05

/** Names in order of first appearance. */
export const inOrder = (names: readonly string[]): string[] => [...new Set(names)]

/** The observations of each key, keys in order of first appearance. */
export function groupedBy(observations: readonly Observation[], keyOf: (o: Observation) => string): Map<string, Observation[]> {
  const groups = new Map<string, Observation[]>()
  for (const o of observations) {
    const group = groups.get(keyOf(o))
    if (group) group.push(o)
    else groups.set(keyOf(o), [o])
  }
  return groups
}

export const byTreatment = (observations: readonly Observation[]) => groupedBy(observations, (o) => o.treatment)
export const valuesOf = (observations: readonly Observation[]): number[] => observations.map((o) => o.value)

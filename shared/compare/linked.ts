/** Treatments that blocks link, directly or through others: only these can be compared side by side. */
import type { Observation } from './observations.ts'

/** In order of first appearance; a treatment that shares no block stands alone. */
export function linkedGroups(observations: readonly Observation[]): string[][] {
  const groups: Array<{ treatments: Set<string>; blocks: Set<string> }> = []
  for (const { treatment, block } of observations) {
    const touched = groups.filter((g) => g.treatments.has(treatment) || (block !== null && g.blocks.has(block)))
    const [first = { treatments: new Set<string>(), blocks: new Set<string>() }, ...others] = touched
    if (touched.length === 0) groups.push(first)
    first.treatments.add(treatment)
    if (block !== null) first.blocks.add(block)
    for (const other of others) {
      for (const name of other.treatments) first.treatments.add(name)
      for (const name of other.blocks) first.blocks.add(name)
      groups.splice(groups.indexOf(other), 1)
    }
  }
  return groups.map((g) => [...g.treatments])
}

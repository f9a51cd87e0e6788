/** What readings in doubt are in doubt for. */
import type { PageScore } from './compare.ts'

/** The reader's own reasons in a few words; what the checks find beside them puts nothing in doubt. */
const WORDS: Readonly<Record<string, string>> = {
  Q16: 'unit not plain',
  Q55: 'gap between digits',
  R01: 'a box looks spoiled',
  R02: 'a box is not sure',
  R03: 'ink and sums favour different values',
  R04: 'a sum does not hold, or may not',
  R05: 'not decided',
  R06: 'a tick is not plain',
  R07: 'boxes not well placed, or not seen',
}

export const causeOf = (rules: readonly string[]): string =>
  [...new Set(rules.flatMap((rule) => WORDS[rule] ?? []))].sort().join(' + ') || 'no reason of the reader'

/** One line for each cause, the most frequent first, with its share of all readings of its kind. */
export function whyLines(pages: readonly PageScore[]): string[] {
  return (['tied', 'untied', 'ticks'] as const).flatMap((kind) => {
    const readings = pages.reduce((sum, p) => sum + p[kind].readings, 0)
    const counts = new Map<string, number>()
    for (const { kind: of, cause } of pages.flatMap((p) => p.causes)) {
      if (of === kind) counts.set(cause, (counts.get(cause) ?? 0) + 1)
    }
    const lines = [...counts.entries()].sort(([, a], [, b]) => b - a)
    return lines.map(
      ([cause, n]) => `  ${kind.padEnd(7)}${String(n).padStart(5)}  ${((100 * n) / readings).toFixed(2)} %  ${cause}`,
    )
  })
}

/** Sums pages up to the figures by level, with intervals. */
import type { PageScore, Tally } from './compare.ts'
import { bootstrapBySheet, exactInterval, quantile, type SheetShare } from './statistics.ts'

const shareOf = (sheets: readonly SheetShare[]) => {
  const hits = sheets.reduce((sum, [h]) => sum + h, 0)
  const count = sheets.reduce((sum, [, n]) => sum + n, 0)
  return { hits, count, share: count > 0 ? hits / count : null }
}

/** Interval by sheet; a share of nothing or of everything has no spread between sheets, so there the exact one stands. */
function interval(sheets: readonly SheetShare[]): [number, number] {
  const { hits, count } = shareOf(sheets)
  const { low, high } = hits === 0 || hits === count ? exactInterval(hits, count) : bootstrapBySheet(sheets)
  return [low, high]
}

function kindFigures(tallies: readonly Tally[]) {
  const doubts: SheetShare[] = tallies.map((t) => [t.doubts, t.readings])
  const silent: SheetShare[] = tallies.map((t) => [t.silent, t.clear])
  const { hits: wrong, count: clear, share } = shareOf(silent)
  const exact = exactInterval(wrong, clear)
  return {
    readings: shareOf(doubts).count,
    doubtShare: shareOf(doubts).share,
    doubtShareInterval: interval(doubts),
    silentError: { wrong, clear, share, low: exact.low, high: exact.high, bySheet: interval(silent) },
  }
}

const sorted = (values: readonly number[]) => [...values].sort((a, b) => a - b)
const rounded = (value: number) => Math.round(value * 1000) / 1000

/** Figures of one level. */
export function levelFigures(pages: readonly PageScore[]) {
  const read = pages.filter((p) => !p.takeAgain)
  const again = pages.length - read.length
  const caught = read.map((p) => p.caught)
  const cpu = sorted(pages.map((p) => p.cpuMs))
  const stageNames = [...new Set(pages.flatMap((p) => Object.keys(p.ms)))]
  const placement = sorted(read.flatMap((p) => p.placement_mm))
  const stages = stageNames.map((name) => {
    const values = sorted(pages.flatMap((p) => p.ms[name] ?? []))
    return [name, { p50: rounded(quantile(values, 0.5)), p95: rounded(quantile(values, 0.95)) }] as const
  })
  return {
    photos: pages.length,
    takeAgainShare: pages.length > 0 ? again / pages.length : null,
    takeAgainInterval: Object.values(exactInterval(again, pages.length)),
    takeAgainCodes: countBy(pages.flatMap((p) => p.takeAgain ?? [])),
    numbers: { tied: kindFigures(read.map((p) => p.tied)), untied: kindFigures(read.map((p) => p.untied)) },
    ticks: kindFigures(read.map((p) => p.ticks)),
    catchShare: shareOf(caught).share,
    catchInterval: interval(caught),
    caught: shareOf(caught),
    blanksReadAsSomething: shareOf(read.map((p) => p.blanks)),
    placement_mm: placement.length
      ? { p50: rounded(quantile(placement, 0.5)), p99: rounded(quantile(placement, 0.99)), max: rounded(placement.at(-1)!) }
      : null,
    cpuMs: { p50: rounded(quantile(cpu, 0.5)), p95: rounded(quantile(cpu, 0.95)), stages: Object.fromEntries(stages) },
  }
}

export type LevelFigures = ReturnType<typeof levelFigures>

function countBy(codes: readonly string[]): Record<string, number> {
  const counts: Record<string, number> = {}
  for (const code of codes) counts[code] = (counts[code] ?? 0) + 1
  return counts
}

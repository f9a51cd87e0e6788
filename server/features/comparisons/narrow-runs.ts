/** What the filters of a comparison offer and keep. */
import {
  type Choice,
  COMPARISON_FILTERS,
  type ComparedThing,
  type ComparisonFilter,
  type ComparisonQuery,
} from '../../../shared/schemas/book-comparison.ts'
import type { ComparableRun } from '../../db/desk/comparable-runs.ts'

interface Side {
  value: string
  words: string
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const

/** Three months by their names, the same on both halves of the earth: "Sep–Nov 2026"; December counts to the coming year. */
export function seasonOf(date: string | null): string {
  if (date === null) return 'no date'
  const [year, month] = [Number(date.slice(0, 4)), Number(date.slice(5, 7))]
  const first = month - (month % 3)
  if (first === 0 || first === 12) return `Dec ${month === 12 ? year : year - 1}–Feb ${month === 12 ? year + 1 : year}`
  return `${MONTHS[first - 1]}–${MONTHS[first + 1]} ${year}`
}

/** "16 Sep 2026" */
export const dayWords = (date: string): string =>
  `${Number(date.slice(8, 10))} ${MONTHS[Number(date.slice(5, 7)) - 1]} ${date.slice(0, 4)}`

const named = (row: { id: string; name: string } | null): Side | null => (row ? { value: row.id, words: row.name } : null)
const plain = (text: string | null | undefined): Side | null => (text ? { value: text, words: text.replaceAll('_', ' ') } : null)

const SIDES: Record<ComparisonFilter, (run: ComparableRun) => Side | null> = {
  tractor: (run) => named(run.tractor),
  implement: (run) => named(run.implement),
  operation: (run) => plain(run.implement?.operation),
  gear: (run) => plain(run.gear),
  soil: (run) => plain(run.soil),
  region: (run) => plain(run.place?.district),
  season: (run) => plain(seasonOf(run.trialDate)),
}

/** What a run is compared by; null where the record does not say. Machines of one name are told apart by their numbers. */
export function treatmentsBy(of: ComparedThing, book: readonly ComparableRun[]): (run: ComparableRun) => string | null {
  if (of !== 'tractor' && of !== 'implement') return (run) => SIDES[of](run)?.words ?? null
  const idsOf = new Map<string, Set<string>>()
  for (const run of book) {
    const row = run[of]
    if (row) idsOf.set(row.name, (idsOf.get(row.name) ?? new Set()).add(row.id))
  }
  return (run) => {
    const row = run[of]
    if (!row) return null
    return idsOf.get(row.name)!.size > 1 ? `${row.name}, no. ${row.number}` : row.name
  }
}

/** Every filter's values with how many runs of the whole book have them, most first. */
export function choicesIn(runs: readonly ComparableRun[]): Record<ComparisonFilter, Choice[]> {
  const choices = COMPARISON_FILTERS.map((filter) => {
    const counted = new Map<string, Choice>()
    for (const run of runs) {
      const side = SIDES[filter](run)
      if (side) counted.set(side.value, { ...side, runs: (counted.get(side.value)?.runs ?? 0) + 1 })
    }
    return [filter, [...counted.values()].sort((a, b) => b.runs - a.runs || a.words.localeCompare(b.words))] as const
  })
  return Object.fromEntries(choices) as Record<ComparisonFilter, Choice[]>
}

export const narrowed = (runs: readonly ComparableRun[], query: ComparisonQuery): ComparableRun[] =>
  runs.filter((run) =>
    COMPARISON_FILTERS.every((filter) => {
      const kept = query[filter]
      return kept.length === 0 || kept.includes(SIDES[filter](run)?.value ?? '')
    }),
  )

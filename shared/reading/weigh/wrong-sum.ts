/** Written results that do not, or may not, follow from their parts. */
import { SUM_HOLDS } from './thresholds.ts'
import type { Factor } from './ties/compile.ts'
import type { Value } from './types.ts'
import type { Variable } from './variable.ts'

/** What a reading was taken as, and whether its ink reads so, at least as a plain second reading. */
export interface Chosen {
  value: Value
  byInk: boolean
}

export interface WrongSum {
  cells: string[]
  /** The written result, and the parts that hold ink, each with its value. */
  result: string
  parts: string
  /** The reading asked about is the written result, not one of its parts. */
  isResult: boolean
  /** More likely wrong than right; otherwise it is only not sure. */
  fails: boolean
}

const MOST_NAMED = 6

/** @param odds null where the tie was not decided. @returns none where the sum holds, or claims nothing. */
export function wrongSum(
  factor: Factor,
  odds: { holds: number; fails: number } | null,
  variables: ReadonlyArray<Variable>,
  chosen: ReadonlyArray<Chosen>,
  reading: number,
): WrongSum[] {
  if (factor.result === null || !odds) return []
  const claimed = odds.holds + odds.fails
  if (claimed < 0.5) return []
  // A sum that holds only with a part read against its ink does not vouch for the result: the writer's slip looks the same.
  const vouched = factor.result !== reading || factor.readings.every((r) => chosen[r]!.byInk)
  if (odds.holds / claimed >= SUM_HOLDS && vouched) return []
  const written = factor.readings.filter((r) => r !== factor.result && chosen[r]!.value !== null)
  const named = written.slice(0, MOST_NAMED).map((r) => `${variables[r]!.label} ${chosen[r]!.value}`)
  if (written.length > MOST_NAMED) named.push(`${written.length - MOST_NAMED} more`)
  return [
    {
      cells: factor.readings.map((r) => variables[r]!.key),
      result: `${variables[factor.result]!.label} ${chosen[factor.result]!.value ?? 'blank'}`,
      parts: named.join('; '),
      isResult: factor.result === reading,
      fails: odds.fails > odds.holds,
    },
  ]
}

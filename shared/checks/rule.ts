/** A rule is a value: what it is called, how severe it can be, which cells it reads, and one small function. */
import type { CheckContext } from './context.ts'

/** stop: no result on these cells, no entering, until a person resolves it. doubt: its cells go to the desk. note: shown only. */
export type Severity = 'stop' | 'doubt' | 'note'

export interface Finding {
  rule: string
  version: number
  severity: Severity
  /** Keys of the cells it names. */
  cells: string[]
  /** One plain sentence with the numbers compared. */
  text: string
  compared: Record<string, number | string>
}

/** What a check returns; the runner adds rule and version. */
export type Found = Omit<Finding, 'rule' | 'version'>

export interface Rule {
  /** Q01 to Q58, or L.. for limits of readings those do not ask about. R.. belongs to the reader. */
  id: string
  version: number
  name: string
  /** The severities it can find, highest first. */
  severity: readonly Severity[]
  /** Cells it reads; a repeated cell by its stem. Empty: every cell of the sheet. */
  cells: readonly string[]
  /** Why it is asked, for the page of rules. [P] practice, [M] a standard from memory, [F] a published page. */
  why: string
  check: (ctx: CheckContext) => Found[]
}

/** Ten figures: browsers and servers may differ in the sixteenth, and what a person settled is known again by these numbers. */
const steady = (value: number | string) => (typeof value === 'number' ? Number(value.toPrecision(10)) : value)

export const found = (
  severity: Severity,
  cells: string[],
  text: string,
  compared: Record<string, number | string> = {},
): Found => ({
  severity,
  cells,
  text,
  compared: Object.fromEntries(Object.entries(compared).map(([name, value]) => [name, steady(value)])),
})

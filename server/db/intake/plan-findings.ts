/** The typed block of a planned sheet against the plan: a sheet printed before the plan was changed is noticed. */
import type { Finding } from '../../../shared/checks/rule.ts'
import type { RunPlan } from './plan-of-run.ts'

interface Printed {
  cell: string
  words: string
  /** What the block says, by its label; the first group is the value. */
  pattern: RegExp
  planned: (plan: RunPlan) => string
}

const day = (iso: string) => iso.split('-').reverse().join('-')

/** A day a demonstration can be on, DD-MM-YYYY; another one was not printed so, but read so. */
const A_DAY = /\b((?:0[1-9]|[12]\d|3[01])-(?:0[1-9]|1[0-2])-20[0-4]\d)\b/

/** As server/print/plan-lines.ts prints them. */
const PRINTED: readonly Printed[] = [
  { cell: 'trial_date', words: 'date', pattern: A_DAY, planned: (p) => day(p.heldOn) },
  { cell: 'place_id', words: 'place', pattern: /\bplace\s+(\d{1,4})\b/i, planned: (p) => String(p.placeNumber) },
  { cell: 'tractor_id', words: 'tractor', pattern: /\btractor\s+(\d{1,4})\b/i, planned: (p) => String(p.tractorNumber) },
  { cell: 'implement_id', words: 'implement', pattern: /\bimplement\s+(\d{1,4})\b/i, planned: (p) => String(p.implementNumber) },
  { cell: 'kit_id', words: 'kit', pattern: /\bkit(?: \(mL\))?\s+(\d{1,4})\b/i, planned: (p) => String(p.kitNumber) },
  {
    cell: 'demonstrator_id',
    words: 'demonstrator',
    pattern: /\bdemonstr\.?\s+(\d{1,4})\b/i,
    planned: (p) => String(p.demonstratorNumber),
  },
]

/** One doubt for each fact that the block states otherwise than the plan; what could not be recognised says nothing. */
export function planFindings(lines: readonly string[], plan: RunPlan): Finding[] {
  const text = lines.join('\n')
  return PRINTED.flatMap(({ cell, words, pattern, planned }) => {
    const printed = pattern.exec(text)?.[1]
    const expected = planned(plan)
    if (printed === undefined || printed.replace(/^0+/, '') === expected.replace(/^0+/, '')) return []
    const said = `The typed block says ${words} ${printed}, the plan says ${expected}: was the sheet printed before the plan changed?`
    return [
      {
        rule: 'plan',
        version: 1,
        severity: 'doubt' as const,
        cells: [cell],
        text: said,
        compared: { printed, planned: expected },
      },
    ]
  })
}

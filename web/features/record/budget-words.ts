/** What the parts of a budget are called in a sentence, and what would make them smaller in the field. Pure. */
import type { BudgetLine } from '../../../shared/trial/budget.ts'

const SPOKEN: Record<string, string> = {
  'reading the jar': 'the jar',
  'setting the jar to its line': 'the line on the jar',
  'filling the jug': 'the jug',
  'scale of the jar': 'the scale of the jar',
  'scale of the jug': 'the scale of the jug',
  'reading the balance': 'the balance',
  clock: 'the clock',
  tape: 'the tape',
  odometer: 'the odometer',
}

const SMALLER: Record<string, string> = {
  'reading the jar': 'A jar with finer marks, or refilling it to the same line, makes it smaller.',
  'edge of the plot': 'A larger plot makes it smaller.',
  'filling the jug': 'Fewer top-ups, or a jug with finer marks, make it smaller.',
  clock: 'A longer run, or a clock with seconds, makes it smaller.',
  'scatter of the depths': 'More depths make it smaller.',
  'range of the draft table': 'A dynamometer in the hitch makes it smaller.',
}

const HALF = 0.5
const MUCH = 0.4

const spoken = (name: string) => SPOKEN[name] ?? `the ${name}`

/** "71 % of the variance is the jar. A jar with finer marks …"; null where nothing is unsure. */
export function largestWords(lines: readonly BudgetLine[]): string | null {
  const [most, next] = lines
  if (!most) return null
  const share = `${Math.round(most.share * 100)} %`
  if (most.share >= MUCH || !next)
    return [`${share} of the variance is ${spoken(most.name)}.`, SMALLER[most.name]].filter(Boolean).join(' ')
  const both = most.share + next.share >= HALF ? `, with ${spoken(next.name)} more than half` : ''
  return `The largest part is ${spoken(most.name)}, ${share} of the variance${both}.`
}

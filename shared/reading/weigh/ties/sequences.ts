/** Clock order, pairs that may not fall, like readings, and a meter that runs with the clock: weights between neighbours. */
import type { Tie } from '../../../layouts/tie.ts'
import type { Chain, State } from '../chain.ts'
import { likeness } from '../likeness.ts'
import { APART, LATE, REVERSED } from '../thresholds.ts'
import type { Variable } from '../variable.ts'
import { tupleChain } from './tuple.ts'

const DAY_MIN = 1440
const LONGEST_RUN_MIN = 720
const NOTHING = 'none'
const SILENT = { holds: 0, fails: 0, silent: 1 }

/** Passes over blanks and what cannot be read; weighs each value against the one before. */
function neighbourChain(weigh: (before: number, now: number, at: number) => number): Chain {
  return {
    start: NOTHING,
    step(state: State, at, count, to) {
      const known = typeof count === 'number'
      to.state = known ? count : state
      to.weight = known && typeof state === 'number' ? weigh(state, count, at) : 1
    },
    end: () => SILENT,
  }
}

export const orderChain = (tie: Extract<Tie, { kind: 'order' }>): Chain =>
  neighbourChain((before, now) => {
    const gap = now - before
    if (gap < 0) return gap + DAY_MIN <= LONGEST_RUN_MIN ? REVERSED * 2 : REVERSED
    return gap <= tie.usual_min ? 1 : gap <= LONGEST_RUN_MIN ? LATE : REVERSED
  })

/** Readings in the order less, greater. */
export function notLessChain(tie: Extract<Tie, { kind: 'not-less' }>, variables: ReadonlyArray<Variable>): Chain {
  const [less, greater] = variables as [Variable, Variable]
  return neighbourChain((before, now) => {
    const rise = now / 10 ** greater.places - before / 10 ** less.places
    if (rise < 0) return REVERSED
    return tie.usual !== undefined && rise > tie.usual ? LATE : 1
  })
}

export function nearChain(tie: Extract<Tie, { kind: 'near' }>, variables: ReadonlyArray<Variable>): Chain {
  const unit = variables.map((v) => 10 ** v.places)
  return neighbourChain((before, now, at) => {
    // Neighbours in a tie have the same places; a blank between them changes nothing.
    return likeness(before / unit[at]!, now / unit[at]!, tie)
  })
}

/**
 * Readings in the order less, greater, start, end. An electronic meter runs with the clock; a mechanical one counts at rated
 * speed (rule Q18: 0.5 to 1.15 of the time).
 */
export function elapsedChain(variables: ReadonlyArray<Variable>): Chain {
  const unit = variables.map((v) => 10 ** v.places)
  const says = (silent: number) => ({ holds: 0, fails: 0, silent })
  return tupleChain((counts) => {
    const [less, greater, start, end] = counts.map((count, at) => (typeof count === 'number' ? count / unit[at]! : Number.NaN))
    const rise_h = greater! - less!
    const run_h = ((end! - start! + DAY_MIN) % DAY_MIN) / 60
    if (!Number.isFinite(rise_h + run_h)) return says(APART)
    if (Math.abs(rise_h - run_h) <= 0.1 + 0.05 * run_h + 1e-9) return SILENT
    const mechanical = rise_h >= 0.5 * run_h - 0.1 && rise_h <= 1.15 * run_h + 0.1
    return says(mechanical ? 0.3 : APART / 2)
  })
}

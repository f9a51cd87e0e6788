/** Balance and mean: the state is the running sum, with the number of readings for a mean. */
import type { Tie } from '../../../layouts/tie.ts'
import type { Chain, State } from '../chain.ts'
import type { Variable } from '../variable.ts'
import { exact, NOT_WRITTEN, rounded, UNKNOWN } from './result.ts'

const LOST = 'lost'
const BLANK_RESULT = 'blank'
const HOLDS = 'holds'
const FAILS = 'fails'

/** All counts are brought to the finest place among the readings. */
export function balanceChain(tie: Extract<Tie, { kind: 'balance' }>, variables: ReadonlyArray<Variable>): Chain {
  const places = Math.max(...variables.map((v) => v.places))
  const scale = variables.map((v) => 10 ** (places - v.places))
  const last = variables.length - 1
  return {
    start: 0,
    step(state, at, count, to) {
      to.weight = 1
      const variable = variables[at]!
      if (at === last) {
        to.state = resultState(state, count, (sum) => count! * scale[at]! === sum)
      } else if (state === LOST || count === undefined || (count === null && variable.mandatory)) {
        to.state = LOST
      } else {
        to.state = (state as number) + (tie.minus.includes(variable.key) ? -1 : 1) * (count ?? 0) * scale[at]!
      }
    },
    end: ending,
  }
}

/** Room for the count of readings beside their sum in one number. */
const READINGS = 256

export function meanChain(variables: ReadonlyArray<Variable>): Chain {
  const last = variables.length - 1
  const parts = variables.slice(0, last)
  const places = Math.max(...parts.map((v) => v.places))
  const scale = parts.map((v) => 10 ** (places - v.places))
  const toResult = 10 ** (variables[last]!.places - places)
  return {
    start: 0,
    step(state, at, count, to) {
      to.weight = 1
      if (at === last) {
        to.state = resultState(state, count, (packed) => {
          const n = packed % READINGS
          if (n === 0) return null
          const mean = ((packed - n) / READINGS / n) * toResult
          return rounded(count!, mean, false).holds > 0
        })
      } else if (state === LOST || count === undefined) {
        to.state = LOST
      } else {
        to.state = count === null ? state : (state as number) + count * scale[at]! * READINGS + 1
      }
    },
    end: ending,
  }
}

function resultState(state: State, count: number | null | undefined, holds: (sum: number) => boolean | null): State {
  if (count === null) return BLANK_RESULT
  if (count === undefined || typeof state !== 'number') return LOST
  const answer = holds(state)
  return answer === null ? LOST : answer ? HOLDS : FAILS
}

function ending(state: State) {
  if (state === BLANK_RESULT) return NOT_WRITTEN
  return state === LOST ? UNKNOWN : exact(state === HOLDS)
}

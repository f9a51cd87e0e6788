/**
 * Exact weighing of one tie by dynamic programming: its readings are passed one after the other, a state carries what the tie
 * still needs to know (a sum, a count, the last time), and the weights of equal states are added up. A forward and a backward
 * pass give the weight of every option of every reading under the tie.
 */
/** A number, a name, or an object that is the same one for the same state. */
export type State = number | string | object

/** What a tie needs, for readings in a fixed order. Count: a number, null for a blank, undefined for anything unreadable. */
export interface Chain {
  start: State
  /** The next state and the weight of going there (written to `to`). */
  step(state: State, at: number, count: number | null | undefined, to: { state: State; weight: number }): void
  /** Weights with which the tie holds, fails, or has nothing to say at the end. */
  end(state: State): { holds: number; fails: number; silent: number }
}

/** Weights of a reading's options as they come in; `other` stands last. */
interface Incoming {
  counts: ReadonlyArray<number | null | undefined>
  weights: ArrayLike<number>
}

export interface ChainResult {
  /** For every reading the weight of each option by all the others. */
  outgoing: Float64Array[]
  holds: number
  fails: number
  silent: number
  /** Weight of ways that were left out, beside the total: a bound, as none can end with more weight than it had. */
  leftOut: number
}

/** Counts steps across one sheet, so that a hopeless group ends as "not decided" and not as a wait. */
export interface Budget {
  steps: number
  /** States and options below this share of the best are left out. */
  floor: number
  expired(): boolean
}

export class NotDecided extends Error {}

export function runChain(chain: Chain, readings: ReadonlyArray<Incoming>, budget: Budget): ChainResult {
  const forward: Array<Map<State, number>> = [new Map([[chain.start, 1]])]
  const orders = readings.map((reading) => descending(reading.weights))
  const leasts: number[] = []
  const to = { state: chain.start, weight: 1 }
  let left = 0
  readings.forEach((reading, at) => {
    const from = forward[at]!
    const next = new Map<State, number>()
    const order = orders[at]!
    const least = largest(from) * (reading.weights[order[0]!] ?? 0) * budget.floor
    leasts.push(least)
    for (const [state, weight] of from) {
      let rest = 1
      for (const k of order) {
        const w = reading.weights[k]!
        if (weight * w <= least) break
        rest -= w
        budget.steps--
        chain.step(state, at, reading.counts[k], to)
        if (to.weight > 0) next.set(to.state, (next.get(to.state) ?? 0) + weight * w * to.weight)
      }
      left += weight * Math.max(0, rest)
      if (budget.steps < 0) throw new NotDecided()
    }
    if (budget.expired()) throw new NotDecided()
    forward.push(next)
  })
  let backward = new Map<State, number>()
  const total = { holds: 0, fails: 0, silent: 0 }
  for (const [state, weight] of forward[readings.length]!) {
    const end = chain.end(state)
    total.holds += weight * end.holds
    total.fails += weight * end.fails
    total.silent += weight * end.silent
    backward.set(state, end.holds + end.fails + end.silent)
  }
  const outgoing: Float64Array[] = []
  for (let at = readings.length - 1; at >= 0; at--) {
    const reading = readings[at]!
    const message = new Float64Array(reading.counts.length)
    const before = new Map<State, number>()
    for (const [state, weight] of forward[at]!) {
      let back = 0
      for (const k of orders[at]!) {
        const w = reading.weights[k]!
        if (weight * w <= leasts[at]!) break
        chain.step(state, at, reading.counts[k], to)
        const onward = to.weight > 0 ? to.weight * (backward.get(to.state) ?? 0) : 0
        message[k]! += weight * onward
        back += w * onward
      }
      before.set(state, back)
    }
    outgoing[at] = message
    backward = before
  }
  const sum = total.holds + total.fails + total.silent
  return { outgoing, ...total, leftOut: sum > 0 ? left / sum : 1 }
}

/** Places of the weights from the largest down: a state passes over all options below its floor at once. */
function descending(weights: ArrayLike<number>): number[] {
  return Array.from({ length: weights.length }, (_, k) => k).sort((a, b) => weights[b]! - weights[a]!)
}

function largest(states: ReadonlyMap<State, number>): number {
  let best = 0
  for (const weight of states.values()) if (weight > best) best = weight
  return best
}

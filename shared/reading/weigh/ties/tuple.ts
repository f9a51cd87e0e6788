/** Chains that keep every count so far and judge them together at the end: for ties of few readings with few options each. */
import type { Chain, State } from '../chain.ts'
import type { Ending } from './result.ts'

export type Count = number | null | undefined

class Tuple {
  readonly next = new Map<Count, Tuple>()
  ending: Ending | null = null

  constructor(readonly counts: readonly Count[]) {}
}

/** Equal tuples are one object, so states compare by identity and each tuple is judged once, however often its tie is weighed. */
export function tupleChain(judge: (counts: readonly Count[]) => Ending): Chain {
  return {
    start: new Tuple([]),
    step(state: State, _at, count, to) {
      const tuple = state as Tuple
      let next = tuple.next.get(count)
      if (!next) {
        next = new Tuple([...tuple.counts, count])
        tuple.next.set(count, next)
      }
      to.state = next
      to.weight = 1
    },
    end(state) {
      const tuple = state as Tuple
      tuple.ending ??= judge(tuple.counts)
      return tuple.ending
    },
  }
}

/** From a layout's ties to chains over the readings that are on this sheet. */
import type { Tie } from '../../../layouts/tie.ts'
import type { Chain } from '../chain.ts'
import type { Variable } from '../variable.ts'
import { areaChain, rateChain } from './areas.ts'
import { elapsedChain, nearChain, notLessChain, orderChain } from './sequences.ts'
import { balanceChain, meanChain } from './sums.ts'

export interface Factor {
  tie: Tie
  /** Places in the list of readings, in the chain's order. */
  readings: number[]
  chain: Chain
  /** The reading whose written result is judged, if the tie has one. */
  result: number | null
}

const OPTIONS_OF = (variable: Variable) => {
  const named = variable.options.filter((o) => typeof o.value === 'string' && o.count !== null)
  const out: string[] = []
  for (const option of named) out[option.count!] = String(option.value)
  return out
}

/** Ties between readings; marks, repeats and quotients are weighed within their reading. A tie whose needed keys are not on the sheet is left out. */
export function compileTies(ties: ReadonlyArray<Tie>, variables: ReadonlyArray<Variable>): Factor[] {
  const places = new Map(variables.map((v, i) => [v.key, i]))
  const factors: Factor[] = []
  for (const tie of ties) {
    const { keys, optional, result } = keysOf(tie)
    const present = keys.filter((key) => places.has(key))
    if (present.length < (optional ? 2 : keys.length) || present.length < 2) continue
    if (result !== null && !places.has(result)) continue
    const readings = present.map((key) => places.get(key)!)
    const own = readings.map((i) => variables[i]!)
    factors.push({ tie, readings, chain: chainOf(tie, own), result: result === null ? null : places.get(result)! })
  }
  return factors
}

function keysOf(tie: Tie): { keys: readonly string[]; optional: boolean; result: string | null } {
  switch (tie.kind) {
    case 'balance':
      return { keys: [...tie.plus, ...tie.minus, tie.equals], optional: true, result: tie.equals }
    case 'mean':
      return { keys: [...tie.of, tie.equals], optional: true, result: tie.equals }
    case 'area':
      return { keys: [...tie.sides, tie.diagonal, tie.unit, tie.equals], optional: false, result: tie.equals }
    case 'rate':
      return { keys: [tie.amount, tie.area, tie.unit, tie.equals], optional: false, result: tie.equals }
    case 'not-less':
      return { keys: [tie.less, tie.greater], optional: false, result: null }
    case 'elapsed':
      return { keys: [tie.less, tie.greater, tie.start, tie.end], optional: false, result: null }
    case 'order':
    case 'near':
      return { keys: tie.keys, optional: true, result: null }
    case 'alike':
    case 'quotient':
    case 'marks':
      return { keys: [], optional: false, result: null }
  }
}

function chainOf(tie: Tie, own: ReadonlyArray<Variable>): Chain {
  switch (tie.kind) {
    case 'balance':
      return balanceChain(tie, own)
    case 'mean':
      return meanChain(own)
    case 'area':
      return areaChain(tie, own, OPTIONS_OF(own[5]!))
    case 'rate':
      return rateChain(tie, own, OPTIONS_OF(own[2]!))
    case 'not-less':
      return notLessChain(tie, own)
    case 'elapsed':
      return elapsedChain(own)
    case 'order':
      return orderChain(tie)
    case 'near':
      return nearChain(tie, own)
    case 'alike':
    case 'quotient':
    case 'marks':
      throw new Error('Marks, repeats and quotients are weighed within their reading.')
  }
}

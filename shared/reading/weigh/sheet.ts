/** Weighs all readings of one sheet and says which are clear and which are in doubt, and why. */
import { type ChoiceCell, type CombCell, isComb, type LayoutCell, type TickCell } from '../../layouts/layout.ts'
import type { Tie } from '../../layouts/tie.ts'
import type { BoxDist, TickDist } from '../classes.ts'
import type { Budget } from './chain.ts'
import { decideChoice, decideComb, decideTick, isReadAgainstInk } from './decide.ts'
import { weighJointly } from './joint.ts'
import { scaled } from './scale.ts'
import { MOST_STEPS, SHEET_LIMIT_MS, SUM_HOLDS } from './thresholds.ts'
import { compileTies, type Factor } from './ties/compile.ts'
import type { Facts, Weighed, WrongSum } from './types.ts'
import { choiceVariable, combVariable, type Variable } from './variable.ts'

export interface SheetInk {
  /** For every comb on the sheet one distribution a box, in writing order. */
  combs: ReadonlyMap<string, ReadonlyArray<BoxDist>>
  /** One distribution for a tick, one an option (in the layout's order) for a choice. */
  ticks: ReadonlyMap<string, ReadonlyArray<TickDist>>
}

/**
 * Readings of every comb, tick and choice of `layout` that `ink` holds; cells without ink (planned, or not found) are absent.
 * @throws RangeError where the number of boxes does not fit the cell's format.
 */
export function weighSheet(
  layout: { cells: ReadonlyArray<LayoutCell>; ties: ReadonlyArray<Tie> },
  ink: SheetInk,
  facts: Facts = {},
  now: () => number = () => performance.now(),
): Map<string, Weighed> {
  const combs = layout.cells.filter((cell): cell is CombCell => isComb(cell) && ink.combs.has(cell.key))
  const choices = layout.cells.filter((cell): cell is ChoiceCell => cell.kind === 'choice' && ink.ticks.has(cell.key))
  const ticks = layout.cells.filter((cell): cell is TickCell => cell.kind === 'tick' && ink.ticks.has(cell.key))
  const variables: Variable[] = [
    ...combs.map((cell) => combVariable(cell, ink.combs.get(cell.key)!, layout.ties, facts)),
    ...choices.map((cell) => choiceVariable(cell, ink.ticks.get(cell.key)!)),
  ]
  const factors = compileTies(layout.ties, variables)
  const until = now() + SHEET_LIMIT_MS
  const budget = (): Omit<Budget, 'floor'> => ({ steps: MOST_STEPS, expired: () => now() > until })
  const joint = weighJointly(variables, factors, budget)

  const against = variables.map((variable, i) => isReadAgainstInk(variable, joint.posteriors[i]!))
  const out = new Map<string, Weighed>()
  variables.forEach((variable, i) => {
    const posterior = joint.posteriors[i]!
    if (i >= combs.length) {
      out.set(variable.key, decideChoice(variable, posterior))
      return
    }
    const failing = factors.flatMap((factor, f) =>
      factor.readings.includes(i) ? wrongSum(factor, joint.ties[f], variables, i, against) : [],
    )
    out.set(variable.key, decideComb(variable, posterior, failing))
  })
  for (const cell of ticks) out.set(cell.key, decideTick(cell, ink.ticks.get(cell.key)![0]!))
  for (const cell of combs) {
    if (cell.scale) out.set(cell.key, scaled(cell, out.get(cell.key)!, out.get(cell.scale.by)))
  }
  return out
}

function wrongSum(
  factor: Factor,
  odds: { holds: number; fails: number } | null | undefined,
  variables: ReadonlyArray<Variable>,
  reading: number,
  against: readonly boolean[],
): WrongSum[] {
  if (factor.result === null || !odds) return []
  const claimed = odds.holds + odds.fails
  if (claimed < 0.5) return []
  // A sum that holds only with a part read against its ink does not vouch for the result: the writer's slip looks the same.
  const vouched = factor.result !== reading || !factor.readings.some((r) => against[r])
  if (odds.holds / claimed >= SUM_HOLDS && vouched) return []
  const own = factor.readings.map((r) => variables[r]!)
  return [
    {
      cells: own.map((v) => v.key),
      labels: own.map((v) => v.label),
      isResult: factor.result === reading,
      fails: odds.fails > odds.holds,
    },
  ]
}

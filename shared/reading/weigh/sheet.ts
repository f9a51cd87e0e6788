/** Weighs all readings of one sheet and says which are clear and which are in doubt, and why. */
import { type ChoiceCell, type CombCell, isComb, type LayoutCell, type TickCell } from '../../layouts/layout.ts'
import type { Tie } from '../../layouts/tie.ts'
import type { BoxDist, TickDist } from '../classes.ts'
import type { Budget } from './chain.ts'
import { chosen, decideChoice, decideComb, decideTick } from './decide.ts'
import { weighJointly } from './joint.ts'
import { weighByNeighbours } from './likeness.ts'
import { scaled } from './scale.ts'
import { MOST_STEPS, SHEET_LIMIT_MS } from './thresholds.ts'
import { compileTies } from './ties/compile.ts'
import type { Facts, Weighed } from './types.ts'
import { choiceVariable, combVariable, type Variable } from './variable.ts'
import { wrongSum } from './wrong-sum.ts'

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
  weighByNeighbours(variables, layout.ties)
  const factors = compileTies(layout.ties, variables)
  const until = now() + SHEET_LIMIT_MS
  const budget = (): Omit<Budget, 'floor'> => ({ steps: MOST_STEPS, expired: () => now() > until })
  const joint = weighJointly(variables, factors, budget)

  const decided = variables.map((variable, i) => chosen(variable, joint.posteriors[i]!))
  const out = new Map<string, Weighed>()
  variables.forEach((variable, i) => {
    const posterior = joint.posteriors[i]!
    if (i >= combs.length) {
      out.set(variable.key, decideChoice(variable, posterior))
      return
    }
    const failing = factors.flatMap((factor, f) =>
      factor.readings.includes(i) ? wrongSum(factor, joint.ties[f] ?? null, variables, decided, i) : [],
    )
    const unjudged = factors.some((factor, f) => factor.result === i && joint.ties[f] === null)
    out.set(variable.key, decideComb(variable, posterior, unjudged, failing))
  })
  for (const cell of ticks) out.set(cell.key, decideTick(cell, ink.ticks.get(cell.key)![0]!))
  for (const cell of combs) {
    if (cell.scale) out.set(cell.key, scaled(cell, out.get(cell.key)!, out.get(cell.scale.by)))
  }
  return out
}

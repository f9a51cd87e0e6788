/** Area and rate by hand. */
import { HECTARE_M2, type Tie } from '../../../layouts/tie.ts'
import { fourSidedArea_m2 } from '../area.ts'
import type { Chain } from '../chain.ts'
import type { Variable } from '../variable.ts'
import { type Ending, exact, NOT_WRITTEN, rounded, UNKNOWN } from './result.ts'
import { tupleChain } from './tuple.ts'

/** Readings in the order sides, diagonal, unit, equals. `options` are the unit's in the order of its counts. */
export function areaChain(
  tie: Extract<Tie, { kind: 'area' }>,
  variables: ReadonlyArray<Variable>,
  options: ReadonlyArray<string>,
): Chain {
  return tupleChain((counts) => {
    const metres = counts.slice(0, 5).map((count, i) => (typeof count === 'number' ? count / 10 ** variables[i]!.places : count))
    const written = counts[6]
    if (written === null) return NOT_WRITTEN
    const area = fourSidedArea_m2(metres)
    if (typeof written !== 'number') return UNKNOWN
    // Lengths that close no triangle are as good as a wrong sum; missing ones leave the area open.
    if (area === null) return metres.every((m) => typeof m === 'number') ? exact(false) : UNKNOWN
    return byUnit(counts[5], options, tie.squareMetres, (squareMetres) =>
      rounded(written, (area / squareMetres) * 10 ** variables[6]!.places, true),
    )
  })
}

/** Readings in the order amount, area, unit, equals. */
export function rateChain(
  tie: Extract<Tie, { kind: 'rate' }>,
  variables: ReadonlyArray<Variable>,
  options: ReadonlyArray<string>,
): Chain {
  return tupleChain(([amount, area, unit, written]) => {
    if (written === null) return NOT_WRITTEN
    if (typeof amount !== 'number' || typeof area !== 'number' || typeof written !== 'number' || area === 0) return UNKNOWN
    return byUnit(unit, options, tie.squareMetres, (squareMetres) => {
      const hectares = ((area / 10 ** variables[1]!.places) * squareMetres) / HECTARE_M2
      const rate = ((amount / 10 ** variables[0]!.places) * tie.factor) / hectares
      // The area was rounded to its own last place before, or was not: both are right.
      const places = 10 ** variables[3]!.places
      return rounded(written, rate * places, true, (rate * places * 0.5) / area)
    })
  })
}

/** With no unit ticked the writer still had one in mind: any that fits counts, but the tie then claims nothing. */
function byUnit(
  unit: number | null | undefined,
  options: ReadonlyArray<string>,
  squareMetres: Readonly<Record<string, number>>,
  judge: (squareMetres: number) => Ending,
): Ending {
  if (unit === undefined) return UNKNOWN
  const sizes = (unit === null ? options : [options[unit] ?? '']).flatMap((option) => squareMetres[option] ?? [])
  const endings = sizes.map(judge)
  if (unit !== null) return endings[0] ?? UNKNOWN
  const sum = endings.reduce((all, e) => all + e.holds + e.fails, 0)
  return sum > 0 ? { holds: 0, fails: 0, silent: sum / endings.length } : UNKNOWN
}

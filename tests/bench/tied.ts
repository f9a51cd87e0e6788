/** Which number readings the sheet gives a second way to: a sum, or the clock. */
import type { Layout } from '../../shared/layouts/layout.ts'
import type { Tie } from '../../shared/layouts/tie.ts'

/**
 * Marks of an instrument, likeness of repeats and mere bounds choose between readings, but are no second way to one. Registers
 * are not handed to the bench, so their numbers count as untied.
 */
function keysOf(tie: Tie): readonly string[] {
  switch (tie.kind) {
    case 'balance':
      return [...tie.plus, ...tie.minus, tie.equals]
    case 'mean':
      return [...tie.of, tie.equals]
    case 'area':
      return [...tie.sides, tie.diagonal, tie.equals]
    case 'rate':
      return [tie.amount, tie.area, tie.equals]
    case 'order':
      return tie.keys
    case 'elapsed':
      return [tie.less, tie.greater, tie.start, tie.end]
    default:
      return []
  }
}

export const tiedKeys = (layout: Layout): ReadonlySet<string> => new Set(layout.ties.flatMap(keysOf))

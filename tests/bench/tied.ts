/** Which number readings the sheet gives a second way to: a sum, or the clock. */
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import type { Tie } from '../../shared/layouts/tie.ts'

/**
 * Marks of an instrument, likeness of repeats and mere bounds choose between readings, but are no second way to one; clock times
 * that belong together are. Numbers of registers are tied where the reader was handed the registers.
 */
function keysOf(tie: Tie, isTime: (key: string) => boolean): readonly string[] {
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
    case 'near':
      return tie.keys.filter(isTime)
    default:
      return []
  }
}

export function tiedKeys(layout: Layout, registers = false): ReadonlySet<string> {
  const times = new Set(layout.cells.filter((cell) => cell.kind === 'time').map((cell) => cell.key))
  const named = layout.cells.filter((cell) => registers && isComb(cell) && cell.register).map((cell) => cell.key)
  return new Set([...named, ...layout.ties.flatMap((tie) => keysOf(tie, (key) => times.has(key)))])
}

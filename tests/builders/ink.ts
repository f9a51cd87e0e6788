/** Cells, boxes and sheets put together by hand, for the tests of weighing. */
import type { ChoiceCell, CombCell } from '../../shared/layouts/layout.ts'
import type { Tie } from '../../shared/layouts/tie.ts'
import { BLANK, CLASS_COUNT, type TickDist, VOID } from '../../shared/reading/classes.ts'
import { type SheetInk, weighSheet } from '../../shared/reading/weigh/sheet.ts'
import type { Facts, Weighed } from '../../shared/reading/weigh/types.ts'

export const place = { x: 0, y: 0, section: 1, need: 'mandatory' as const }
export const comb = (key: string, format: string, more: Partial<CombCell> = {}): CombCell => ({
  ...place,
  kind: 'digits',
  key,
  label: key,
  format,
  unit: null,
  ...more,
})
export const time = (key: string): CombCell => comb(key, '99:99', { kind: 'time' })

/** A box by its likely classes; the rest is spread thinly over the others. */
export function box(shares: Record<number, number>): number[] {
  const named = Object.values(shares).reduce((a, b) => a + b, 0)
  const rest = (1 - named) / (CLASS_COUNT - Object.keys(shares).length)
  return Array.from({ length: CLASS_COUNT }, (_, k) => shares[k] ?? rest)
}
export const plain = (k: number) => box({ [k]: 0.9999 })
/** '  80' with blanks, 'x' for a spoiled box. */
export const written = (text: string) => [...text].map((c) => plain(c === ' ' ? BLANK : c === 'x' ? VOID : Number(c)))

export const tick = (p: number): TickDist => ({ ticked: p, empty: 1 - p - 1e-5, spoiled: 1e-5 })

export function weigh(
  cells: Array<CombCell | ChoiceCell>,
  ties: Tie[],
  combs: Record<string, number[][]>,
  more: { ticks?: SheetInk['ticks']; facts?: Facts } = {},
) {
  return weighSheet({ cells, ties }, { combs: new Map(Object.entries(combs)), ticks: more.ticks ?? new Map() }, more.facts)
}
export const one = (cell: CombCell, boxes: number[][], ties: Tie[] = [], facts?: Facts): Weighed =>
  weigh([cell], ties, { [cell.key]: boxes }, { facts }).get(cell.key)!
export const rules = (reading: Weighed | undefined) => reading?.reasons.map((r) => r.rule)

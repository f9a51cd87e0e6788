/** Whether two readings of a page show the same writing: another photo of a sheet, or another sheet with its code. */
import type { Value } from '../../../shared/schemas/sheet.ts'

interface Seen {
  key: string
  value: Value
  state: 'clear' | 'in doubt'
}

/** Below this many cells both pictures are sure of, nothing can be said, and the pages are kept apart. */
const ENOUGH = 8
/** A clear reading is wrong about once in a thousand; a copy of a sheet differs in far more than one cell of thirty. */
const DIFFERING_SHARE = 0.03

/** Blank against written counts as differing: ink was added. Ticks are left out, since most sheets tick the same ones. */
export function sameInk(first: readonly Seen[], second: readonly Seen[]): boolean {
  const clear = new Map(first.filter((r) => r.state === 'clear' && typeof r.value !== 'boolean').map((r) => [r.key, r.value]))
  let compared = 0
  let differing = 0
  for (const { key, value, state } of second) {
    if (state !== 'clear' || typeof value === 'boolean' || !clear.has(key)) continue
    const before = clear.get(key)
    if (value === null && before === null) continue
    compared += 1
    if (value !== before) differing += 1
  }
  return compared >= ENOUGH && differing <= Math.max(1, Math.floor(compared * DIFFERING_SHARE))
}

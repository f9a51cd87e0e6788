import { useState } from 'react'
import { isComb, type LayoutCell } from '../../../shared/layouts/layout.ts'
import type { Value } from '../../../shared/schemas/sheet.ts'
import { type DeskMode, LOOK } from './desk-mode.ts'
import { openOf } from './model/desk-items.ts'
import { type Proposal, proposalOf } from './model/proposal.ts'
import { typedValue } from './model/typed-value.ts'
import type { Desk } from './use-desk.ts'

const OF_CANDIDATES = 'taken from what the reader allows'
const KEYED = 'keyed beside the picture'

export type DeskActs = ReturnType<typeof useDeskActs>

/** The verbs of the desk, each said once: keys, rows and words at the foot all call these. */
export function useDeskActs(desk: Desk) {
  const [mode, setMode] = useState<DeskMode>(LOOK)
  const [says, setSays] = useState<string | null>(null)
  const { layout, view, item } = desk
  const cell: LayoutCell | null = layout.cells.find((c) => c.key === desk.key) ?? null
  const reading = desk.key ? (view.readings.get(desk.key) ?? null) : null
  const proposal: Proposal | null = cell && reading ? proposalOf(cell, reading) : null

  const back = () => setMode(LOOK)
  /** Does it, and clears what was said before. */
  const doing = (act: () => void) => {
    setSays(null)
    back()
    act()
  }

  const take = (value: Value) => {
    if (!reading) return
    if (value === reading.value) doing(() => desk.settle('kept', value))
    else if (value === null) doing(() => desk.settle('blank on purpose', null))
    else doing(() => desk.settle('corrected', value, desk.sheet.origin === 'keyed' ? KEYED : OF_CANDIDATES))
  }

  const asProposed = () => {
    if (item?.doubt && !desk.key) setMode({ kind: 'let stand' })
    else if (proposal?.split) setSays('The ink and the sums favour different values: Enter takes neither. Choose one.')
    else if (item?.reading && proposal?.taken) take(proposal.taken.value)
    else if (item?.doubt) setMode({ kind: 'let stand' })
    else if (reading) setSays('No value is proposed here: type it, or mark it unreadable or blank on purpose.')
  }

  const typed = () => {
    if (mode.kind !== 'type' || !cell || !reading) return
    const { value, problem } = typedValue(cell, mode.text, view.values)
    if (problem !== null) setMode({ ...mode, problem })
    else if (value === reading.value) doing(() => desk.settle('kept', value))
    else if (desk.sheet.origin === 'keyed' && reading.value === null) doing(() => desk.settle('corrected', value, KEYED))
    else setMode({ kind: 'why', value })
  }

  return {
    mode,
    setMode,
    says,
    cell,
    reading,
    proposal,
    back,
    take,
    takeNumber: (n: number): boolean => {
      const offer = proposal?.offers[n - 1]
      if (offer) take(offer.value)
      else if (item?.doubt && !desk.key && item.cells[n - 1]) desk.takeCell(item.cells[n - 1] ?? '')
      else return false
      return true
    },
    asProposed,
    type: (text = '') => cell && (isComb(cell) || cell.kind === 'line') && setMode({ kind: 'type', text, problem: null }),
    retype: (text: string) => setMode({ kind: 'type', text, problem: null }),
    typed,
    correct: (value: Value, why: string) => doing(() => desk.settle('corrected', value, why)),
    unreadable: () => reading && doing(() => desk.settle('unreadable', null)),
    blank: () => {
      if (reading) doing(() => desk.settle('blank on purpose', null))
      else doing(() => void desk.allBlank())
    },
    keep: () => {
      if (item?.doubt) setMode({ kind: 'let stand' })
      else if (reading) doing(() => desk.settle('kept', reading.value))
    },
    letStand: (why: string) => doing(() => desk.letStand(why)),
    undo: () => {
      back()
      setSays(desk.undo() ? 'Taken back.' : 'Nothing more to take back.')
    },
    say: setSays,
    /** Why the sheet cannot be entered now; null when it can. */
    notYet: (): string | null => {
      const open = openOf(desk.items).length
      if (open > 0)
        return `${open === 1 ? '1 doubt is' : `${open} doubts are`} open: settle ${open === 1 ? 'it' : 'them'}, then enter.`
      return desk.saved.ops.length > 0 ? 'The last cells are still being saved: once more in a moment.' : null
    },
  }
}

import { useState } from 'react'
import { isComb, type LayoutCell } from '../../../shared/layouts/layout.ts'
import type { Value } from '../../../shared/schemas/sheet.ts'
import { type DeskMode, LOOK } from './desk-mode.ts'
import { openOf } from './model/desk-items.ts'
import { type Offer, type Proposal, proposalOf, whyTaken } from './model/proposal.ts'
import { typedValue } from './model/typed-value.ts'
import type { Desk } from './use-desk.ts'

const KEYED = 'keyed beside the picture'

export type DeskActs = ReturnType<typeof useDeskActs>

/** The verbs of the desk, each said once: keys, rows and words at the foot all call these. `starts` is what is said at first. */
export function useDeskActs(desk: Desk, starts: string | null) {
  const [mode, setMode] = useState<DeskMode>(LOOK)
  const [says, setSays] = useState(starts)
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

  const take = (offer: Offer) => {
    if (!reading || !proposal || desk.readOnly) return
    const { value } = offer
    const why = whyTaken(offer, proposal.offers, reading.value)
    if (why === null) doing(() => desk.settle('kept', value))
    else if (value === null) doing(() => desk.settle('blank on purpose', null))
    else doing(() => desk.settle('corrected', value, desk.sheet.origin === 'keyed' ? KEYED : why))
  }

  const asProposed = () => {
    if (item?.doubt) setMode({ kind: 'let stand' })
    else if (proposal?.split) setSays('The ink and the sums favour different values: Enter takes neither. Choose one.')
    else if (item?.reading && proposal?.taken) take(proposal.taken)
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

  const types = cell !== null && (isComb(cell) || cell.kind === 'line')
  const type = (text = '') => types && setMode({ kind: 'type', text, problem: null })
  const takeNumber = (n: number): boolean => {
    const offer = proposal?.offers[n - 1]
    const named = item?.doubt && !desk.key ? item.cells[n - 1] : undefined
    if (offer) take(offer)
    else if (named) desk.takeCell(named)
    return offer !== undefined || named !== undefined
  }

  return {
    mode,
    /** The cell in hand is one that is typed into. */
    types,
    setMode,
    says,
    cell,
    reading,
    proposal,
    back,
    take,
    takeNumber,
    asProposed,
    type,
    /** A digit takes what it numbers, else it begins to type; what it does is in the foot. */
    digit: (digit: string) => {
      if (takeNumber(Number(digit))) return
      if (types) type(digit)
      else if (cell || item) setSays(`Nothing here has the number ${digit}.`)
    },
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

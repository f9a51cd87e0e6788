import { useMemo, useRef, useState } from 'react'
import type { Layout } from '../../../shared/layouts/layout.ts'
import type { Settlement, Sheet, Value } from '../../../shared/schemas/sheet.ts'
import { itemsOf, nextOpen, openOf } from './model/desk-items.ts'
import { type DeskOp, oppositeOf } from './model/desk-op.ts'
import { viewOf } from './model/desk-view.ts'
import { useSaver } from './use-saver.ts'

export type Desk = ReturnType<typeof useDesk>

/** Which doubt and which cell are in hand, and what can be done with them. */
export function useDesk(sheet: Sheet, layout: Layout, me: string) {
  const { saver, saved } = useSaver(sheet.id)
  const view = useMemo(() => viewOf(sheet, layout, saved.ops, me), [sheet, layout, saved.ops, me])
  const items = useMemo(() => itemsOf(view, layout), [view, layout])
  const [chosen, setChosen] = useState<{ itemId: string | null; key: string | null }>({ itemId: null, key: null })
  const done = useRef<DeskOp[]>([])

  const item = items.find((i) => i.id === chosen.itemId) ?? (chosen.key ? null : (openOf(items)[0] ?? null))
  // A rule that names one cell only has that cell in hand at once.
  const only = item?.doubt && item.cells.length === 1 ? (item.cells[0] ?? null) : null
  const key = chosen.key ?? item?.reading?.key ?? only

  const go = (itemId: string | null, cellKey: string | null = null) => setChosen({ itemId, key: cellKey })
  const act = (op: DeskOp) => {
    done.current = [...done.current, op].slice(-200)
    saver.push(op)
  }
  const goOn = () => {
    const next = nextOpen(items, item?.id ?? null)
    go(next?.id ?? null)
  }

  return {
    sheet,
    layout,
    view,
    items,
    /** The doubt in hand, or null when a clear cell (or nothing) is. */
    item,
    /** The cell in hand. */
    key,
    saver,
    saved,
    go,
    takeCell: (cellKey: string) => go(item?.cells.includes(cellKey) ? item.id : null, cellKey),
    /** Settles the cell in hand and goes to the next doubt. */
    settle: (how: Settlement, value: Value, why = '') => {
      if (key === null) return
      act({ kind: 'settle', key, how, value, why })
      goOn()
    },
    letStand: (why: string) => {
      if (!item?.doubt) return
      act({ kind: 'let stand', fingerprint: item.doubt.fingerprint, why })
      goOn()
    },
    step: (by: 1 | -1) => {
      const at = items.findIndex((i) => i.id === item?.id)
      const next = items[at === -1 ? (by === 1 ? 0 : items.length - 1) : at + by]
      if (next) go(next.id)
    },
    /** Takes back the last act that can be; goes to where it was. */
    undo: (): boolean => {
      const last = done.current.at(-1)
      const opposite = last ? oppositeOf(last) : null
      if (!last || !opposite) return false
      done.current = done.current.slice(0, -1)
      saver.push(opposite)
      if (last.kind === 'settle') go(`ink ${last.key}`, items.some((i) => i.id === `ink ${last.key}`) ? null : last.key)
      else if (last.kind === 'let stand') go(last.fingerprint)
      return true
    },
  }
}

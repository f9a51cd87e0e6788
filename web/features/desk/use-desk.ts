import { useMemo, useRef, useState } from 'react'
import type { Layout } from '../../../shared/layouts/layout.ts'
import type { Settlement, Sheet, Value } from '../../../shared/schemas/sheet.ts'
import { countOf, type DeskItem, itemsOf, nextOpen, numbered, openOf, seenWith } from './model/desk-items.ts'
import { type DeskOp, oppositeOf } from './model/desk-op.ts'
import { BLANK_RULES, type DeskView, viewOf } from './model/desk-view.ts'
import { useSaver } from './use-saver.ts'

export type Desk = ReturnType<typeof useDesk>

/** Which doubt and which cell are in hand, and what can be done with them. */
export function useDesk(given: Sheet, layout: Layout, me: string, readOnly: boolean) {
  const { saver, saved } = useSaver(given.id, !readOnly)
  const sheet = saved.answered && saved.answered.version >= given.version ? saved.answered : given
  // What was refused is not shown as settled: it is asked about. Nor is anything of ours while another has the sheet.
  const refused = saved.trouble?.kind === 'changed'
  const shown = useMemo(() => (readOnly ? [] : refused ? saved.ops.slice(1) : saved.ops), [readOnly, refused, saved.ops])
  const view = useMemo(() => viewOf(sheet, layout, shown, me), [sheet, layout, shown, me])
  const found = useMemo(() => itemsOf(view, layout), [view, layout])
  const [seen, setSeen] = useState<readonly string[]>([])
  const all = seenWith(seen, found)
  if (all.length > seen.length) setSeen(all)
  const items = useMemo(() => numbered(found, all), [found, all])
  const [chosen, setChosen] = useState<{ itemId: string | null; key: string | null }>({ itemId: null, key: null })
  const done = useRef<DeskOp[]>([])

  // A sheet to be keyed begins at its first blank cell; any other at its first doubt.
  const toKey = sheet.origin === 'keyed' && chosen.itemId === null && !chosen.key ? nextBlank(sheet, layout, view, null) : null
  const chosenKey = chosen.key ?? toKey
  const item = items.find((i) => i.id === chosen.itemId) ?? (chosenKey ? null : (openOf(items)[0] ?? null))
  // A rule that names one cell only has that cell in hand at once.
  const only = item?.doubt && item.cells.length === 1 ? (item.cells[0] ?? null) : null
  const key = chosenKey ?? item?.reading?.key ?? only

  const go = (itemId: string | null, cellKey: string | null = null) => setChosen({ itemId, key: cellKey })
  const act = (op: DeskOp) => {
    done.current = [...done.current, op].slice(-200)
    saver.push(op)
  }
  const goOn = () => {
    const blank = nextBlank(sheet, layout, view, key)
    if (blank && (sheet.origin === 'keyed' || isOfBlanks(item))) go(null, blank)
    else go(nextOpen(items, item?.id ?? null)?.id ?? null)
  }

  return {
    sheet,
    layout,
    /** Somebody else has it: it may be looked at. */
    readOnly,
    view,
    items,
    count: countOf(items, all),
    /** The doubt in hand, or null when a clear cell (or nothing) is. */
    item,
    /** The cell in hand. */
    key,
    saver,
    saved,
    go,
    /** Takes a cell in hand: its own doubt where it has one, else the cell within the doubt in hand, else the cell alone. */
    takeCell: (cellKey: string) => {
      const own = items.find((i) => i.reading?.key === cellKey)
      if (own) go(own.id)
      else go(item?.cells.includes(cellKey) ? item.id : null, cellKey)
    },
    /** Settles the cell in hand and goes to the next doubt. */
    settle: (how: Settlement, value: Value, why = '') => {
      if (key === null) return
      act({ kind: 'settle', key, how, value, why })
      goOn()
    },
    /** What a rule found blank was left so on purpose: every cell it names. */
    allBlank: (): boolean => {
      if (key !== null || !item?.doubt || !isOfBlanks(item)) return false
      for (const cell of item.doubt.cells) act({ kind: 'settle', key: cell, how: 'blank on purpose', value: null, why: '' })
      go(nextOpen(items, item.id)?.id ?? null)
      return true
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

const isOfBlanks = (item: DeskItem | null) =>
  item?.doubt !== null && item?.doubt !== undefined && BLANK_RULES.has(item.doubt.rule)

/** The next cell of the page that should hold something and does not: keying goes from one to the next. */
function nextBlank(sheet: Sheet, layout: Layout, view: DeskView, key: string | null): string | null {
  const at = layout.cells.findIndex((cell) => cell.key === key)
  if (at === -1 && key !== null) return null
  const found = layout.cells.slice(at + 1).find((cell) => {
    const reading = view.readings.get(cell.key)
    const wanted = cell.need === 'mandatory' || (sheet.origin === 'keyed' && cell.kind !== 'line')
    return wanted && reading !== undefined && reading.value === null && reading.settlement === null
  })
  return found?.key ?? null
}

/** The doubts of a sheet in order of work: ink first, in the order of the page, then what the rules still find, stops first. */
import { type Layout, wordsFor } from '../../../../shared/layouts/layout.ts'
import type { Reading } from '../../../../shared/schemas/sheet.ts'
import type { DeskDoubt, DeskView } from './desk-view.ts'

export interface DeskItem {
  /** Stays the same while the item is open. */
  id: string
  /** In order of work, from 1. */
  number: number
  label: string
  /** Why it is here, in one sentence. */
  text: string
  open: boolean
  /** Named by letters a, b, c on the sheet. */
  cells: readonly string[]
  /** How many more cells it names than there are letters. */
  more: number
  /** Ink that can be read two ways; null for a doubt of a rule. */
  reading: Reading | null
  doubt: DeskDoubt | null
}

const isDoubtful = (r: Reading) => r.state === 'in doubt'

export function itemsOf(view: DeskView, layout: Layout): DeskItem[] {
  const labels = new Map(layout.cells.map((c) => [c.key, wordsFor(c)]))
  const inked = layout.cells.flatMap((cell) => {
    const reading = view.readings.get(cell.key)
    return reading && isDoubtful(reading) ? [ofReading(reading, wordsFor(cell), view)] : []
  })
  const ruled = view.doubts.filter((d) => d.severity !== 'note').map((d) => ofDoubt(d, labels))
  return [...inked, ...ruled].map((item, i) => ({ ...item, number: i + 1 }))
}

type Unnumbered = Omit<DeskItem, 'number'>

function ofReading(reading: Reading, label: string, view: DeskView): Unnumbered {
  const named = view.doubts.find((d) => d.severity !== 'note' && d.settledBy === null && d.cells.includes(reading.key))
  const reason = reading.reasons[0]
  const cells = reason && reason.cells.length > 1 ? reason.cells : (named?.cells ?? [])
  return {
    id: `ink ${reading.key}`,
    label: capital(label),
    text: reason?.text ?? named?.text ?? twoWays(reading),
    open: reading.settlement === null,
    cells: cells.filter((key) => key !== reading.key).slice(0, LETTERS.length),
    more: 0,
    reading,
    doubt: null,
  }
}

function ofDoubt(doubt: DeskDoubt, labels: ReadonlyMap<string, string>): Unnumbered {
  const [first = ''] = doubt.cells
  return {
    id: doubt.fingerprint,
    label: capital(labels.get(first) ?? first),
    text: doubt.text,
    open: doubt.settledBy === null,
    cells: doubt.cells.slice(0, LETTERS.length),
    more: Math.max(0, doubt.cells.length - LETTERS.length),
    reading: null,
    doubt,
  }
}

/** Marks cells that a rule names. */
export const LETTERS = 'abcdefghijklmnop'

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

function twoWays(reading: Reading): string {
  const [one, two] = reading.candidates
  if (one && two) return `The ink can be read as ${String(one.value)} or as ${String(two.value)}.`
  return 'The ink cannot be read with any certainty.'
}

export const openOf = (items: readonly DeskItem[]) => items.filter((item) => item.open)

/** What an item asks about: the same when its cells have other values meanwhile. */
const topicOf = ({ id, doubt }: DeskItem) => (doubt ? JSON.stringify([doubt.rule, doubt.cells]) : id)

/** Every topic seen in this sitting, in the order it was first seen: a doubt that a correction ended is gone from the items. */
export function seenWith(seen: readonly string[], items: readonly DeskItem[]): readonly string[] {
  const all = new Set([...seen, ...items.map(topicOf)])
  return all.size > seen.length ? [...all] : seen
}

/** Each item keeps its number of the sitting while others go. */
export const numbered = (items: readonly DeskItem[], seen: readonly string[]): DeskItem[] =>
  items.map((item) => ({ ...item, number: seen.indexOf(topicOf(item)) + 1 }))

/** How many were seen in this sitting, and how many of them are settled: by a person, or by a correction that ended them. */
export function countOf(items: readonly DeskItem[], seen: readonly string[]) {
  const open = new Set(openOf(items).map(topicOf)).size
  return { all: seen.length, settled: seen.length - open, open }
}

/** The next open one after the one in hand, from the top again at the end. */
export function nextOpen(items: readonly DeskItem[], fromId: string | null): DeskItem | null {
  const at = items.findIndex((item) => item.id === fromId)
  const turned = [...items.slice(at + 1), ...items.slice(0, Math.max(0, at + 1))]
  return turned.find((item) => item.open && item.id !== fromId) ?? null
}

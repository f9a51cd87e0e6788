import { formatValue } from '../../../shared/layouts/cell-value.ts'
import type { KeyMap } from '../../lib/use-keys.ts'
import type { FootKey } from '../../ui/foot.tsx'
import { BLANK_RULES } from './model/desk-view.ts'
import type { Desk } from './use-desk.ts'
import type { DeskActs } from './use-desk-acts.ts'

/** Acts on the whole sheet. */
export interface WholeActs {
  entering: () => void
  leave: () => void
  /** To the next sheet; null where none waits. */
  next: (() => void) | null
}

/** Which key does what; the foot names the same acts. */
export function deskKeyMap(desk: Desk, acts: DeskActs, whole: WholeActs): KeyMap {
  const { mode } = acts
  const goBack = () => (mode.kind === 'look' ? whole.leave() : acts.back())
  if (desk.readOnly) return { Escape: goBack, ...(mode.kind === 'look' ? lookKeys(desk, acts, whole) : {}) }
  if (mode.kind !== 'look') return { Escape: goBack, 'Ctrl+z': acts.undo, 'Shift+Enter': whole.entering }
  const digits = Object.fromEntries([...'0123456789'].map((digit) => [digit, () => acts.digit(digit)]))
  const acted: Array<[string, () => void]> = [
    ['Enter', acts.asProposed],
    ['Shift+Enter', whole.entering],
    ['F2', () => acts.type()],
    ['u', acts.unreadable],
    ['b', acts.blank],
    ['k', acts.keep],
    ['s', () => acts.setMode({ kind: 'send back' })],
    ['a', () => mayBeSetAside(desk) && acts.setMode({ kind: 'set aside' })],
    ['Ctrl+z', acts.undo],
    ['Escape', goBack],
  ]
  return { ...lookKeys(desk, acts, { ...whole, next: null }), ...digits, ...Object.fromEntries(acted) }
}

/** A record stands on a challenged sheet: it is entered again or sent back. */
const mayBeSetAside = (desk: Desk) => desk.sheet.state !== 'challenged'

/** What a sheet may be asked for without changing it. */
function lookKeys(desk: Desk, acts: DeskActs, { next }: WholeActs): KeyMap {
  const looked: Array<[string, () => void]> = [
    ['ArrowDown', () => desk.step(1)],
    ['ArrowUp', () => desk.step(-1)],
    ['/', () => acts.setMode({ kind: 'find' })],
    ['?', () => acts.setMode({ kind: 'keys' })],
  ]
  return { ...Object.fromEntries(looked), ...(next ? { n: next } : {}) }
}

const lookFoot = (desk: Desk, whole: WholeActs): FootKey[] => [
  ...(desk.items.length > 0 ? [{ keys: '↑ ↓', does: 'look at its doubts' }] : []),
  { keys: 'Escape', does: 'back to the list', press: whole.leave },
  ...(whole.next ? [{ keys: 'n', does: 'next sheet', press: whole.next }] : []),
]

/** While the margin asks for something. */
function askFoot({ mode, back }: DeskActs): FootKey[] {
  const leave = { keys: 'Escape', does: 'leave it as it was', press: back }
  if (mode.kind === 'type')
    return [{ keys: '0 to 9', does: 'fill its boxes' }, { keys: 'Enter', does: 'take what is typed' }, leave]
  if (mode.kind === 'find') return [{ keys: 'Enter', does: 'take the first in hand' }, leave]
  if (mode.kind === 'keys') return [leave]
  return [{ keys: 'Enter', does: 'do it, with this reason' }, { keys: '0 to 9', does: 'are text of the reason' }, leave]
}

/** What the digits do with the cell in hand: take an offer, and beyond the offers type. */
function digitKeys(offers: number, types: boolean, type: () => void): FootKey[] {
  const taking = offers > 0 ? [{ keys: offers === 1 ? '1' : `1 to ${offers}`, does: 'take' }] : []
  if (!types) return taking
  const rest = offers === 0 ? 'F2 or a digit' : offers > 7 ? 'F2' : `F2, ${offers + 1} to 9`
  return [...taking, { keys: rest, does: 'type it', press: type }]
}

export function deskFootKeys(desk: Desk, acts: DeskActs, whole: WholeActs): FootKey[] {
  if (acts.mode.kind !== 'look') return askFoot(acts)
  if (desk.readOnly) return lookFoot(desk, whole)
  const { entering } = whole
  const { item } = desk
  const { proposal, reading } = acts
  const offers = proposal?.offers.length ?? 0
  const named = Math.min(9, item?.cells.length ?? 0)
  const always: FootKey[] = [
    { keys: 's', does: 'send back', press: () => acts.setMode({ kind: 'send back' }) },
    ...(mayBeSetAside(desk) ? [{ keys: 'a', does: 'set aside', press: () => acts.setMode({ kind: 'set aside' }) }] : []),
    { keys: 'Shift Enter', does: 'enter, next', press: entering },
    { keys: 'Ctrl z', does: 'undo', press: acts.undo },
    { keys: '?', does: 'all keys', press: () => acts.setMode({ kind: 'keys' }) },
  ]
  if (!reading) {
    if (!item) return [{ keys: '/', does: 'find a cell', press: () => acts.setMode({ kind: 'find' }) }, ...always]
    return [
      { keys: 'Enter', does: 'let it stand, with the reason', press: acts.asProposed },
      ...(named > 0 ? [{ keys: named === 1 ? '1' : `1 to ${named}`, does: 'take a cell in hand' }] : []),
      ...(item.doubt && BLANK_RULES.has(item.doubt.rule) ? [{ keys: 'b', does: 'all blank on purpose', press: acts.blank }] : []),
      ...always,
    ]
  }
  const taken = proposal?.taken && item?.reading ? formatValue(acts.cell ?? undefined, proposal.taken.value) : null
  return [
    ...(taken ? [{ keys: 'Enter', does: `settle as ${taken}, next`, press: acts.asProposed }] : []),
    ...(item?.doubt ? [{ keys: 'Enter', does: 'let it stand, with the reason', press: acts.asProposed }] : []),
    ...digitKeys(offers, acts.types, () => acts.type()),
    { keys: 'u', does: 'unreadable', press: acts.unreadable },
    { keys: 'b', does: 'blank on purpose', press: acts.blank },
    ...(item?.doubt ? [] : [{ keys: 'k', does: 'keep', press: acts.keep }]),
    ...always,
  ]
}

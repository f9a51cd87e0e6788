import { formatValue } from '../../../shared/layouts/cell-value.ts'
import type { KeyMap } from '../../lib/use-keys.ts'
import type { FootKey } from '../../ui/foot.tsx'
import { BLANK_RULES } from './model/desk-view.ts'
import type { Desk } from './use-desk.ts'
import type { DeskActs } from './use-desk-acts.ts'

/** Which key does what; the foot names the same acts. */
export function deskKeyMap(desk: Desk, acts: DeskActs, whole: { entering: () => void; leave: () => void }): KeyMap {
  const { mode } = acts
  const goBack = () => (mode.kind === 'look' ? whole.leave() : acts.back())
  if (mode.kind !== 'look') return { Escape: goBack, 'Ctrl+z': acts.undo, 'Shift+Enter': whole.entering }
  const digits = Object.fromEntries(
    [...'0123456789'].map((digit) => [digit, () => (acts.takeNumber(Number(digit)) ? undefined : acts.type(digit))]),
  )
  const acted: Array<[string, () => void]> = [
    ['Enter', acts.asProposed],
    ['Shift+Enter', whole.entering],
    ['F2', () => acts.type()],
    ['u', acts.unreadable],
    ['b', acts.blank],
    ['k', acts.keep],
    ['s', () => acts.setMode({ kind: 'send back' })],
    ['a', () => acts.setMode({ kind: 'set aside' })],
    ['ArrowDown', () => desk.step(1)],
    ['ArrowUp', () => desk.step(-1)],
    ['/', () => acts.setMode({ kind: 'find' })],
    ['?', () => acts.setMode({ kind: 'keys' })],
    ['Ctrl+z', acts.undo],
    ['Escape', goBack],
  ]
  return { ...digits, ...Object.fromEntries(acted) }
}

export function deskFootKeys(desk: Desk, acts: DeskActs, entering: () => void): FootKey[] {
  const { item, key } = desk
  const { proposal, reading } = acts
  const offers = proposal?.offers.length ?? 0
  const always: FootKey[] = [
    { keys: 's', does: 'send back', press: () => acts.setMode({ kind: 'send back' }) },
    { keys: 'a', does: 'set aside', press: () => acts.setMode({ kind: 'set aside' }) },
    { keys: 'Shift Enter', does: 'enter, next', press: entering },
    { keys: 'Ctrl z', does: 'undo', press: acts.undo },
    { keys: '?', does: 'all keys', press: () => acts.setMode({ kind: 'keys' }) },
  ]
  if (!reading) {
    if (!item) return always
    return [
      { keys: 'Enter', does: 'let it stand, with the reason', press: acts.asProposed },
      { keys: '1 to 9', does: 'take a cell in hand' },
      ...(item.doubt && BLANK_RULES.has(item.doubt.rule) ? [{ keys: 'b', does: 'all blank on purpose', press: acts.blank }] : []),
      ...always,
    ]
  }
  const taken = proposal?.taken && item?.reading ? formatValue(acts.cell ?? undefined, proposal.taken.value) : null
  return [
    ...(taken ? [{ keys: 'Enter', does: `settle as ${taken}, next doubt`, press: acts.asProposed }] : []),
    ...(offers > 0 ? [{ keys: offers === 1 ? '1' : `1 to ${offers}`, does: 'take one' }] : []),
    { keys: 'F2', does: 'type it', press: () => acts.type() },
    { keys: 'u', does: 'unreadable', press: acts.unreadable },
    { keys: 'b', does: 'blank on purpose', press: acts.blank },
    { keys: 'k', does: item?.doubt && key ? 'let it stand' : 'keep', press: acts.keep },
    ...always,
  ]
}

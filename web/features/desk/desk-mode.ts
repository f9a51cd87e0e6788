import type { Value } from '../../../shared/schemas/sheet.ts'

/** What the margin is busy with: looking at a doubt, typing a value, giving a reason, or asking for something. */
export type DeskMode =
  | { kind: 'look' }
  | { kind: 'type'; text: string; problem: string | null }
  | { kind: 'why'; value: Value }
  | { kind: 'let stand' }
  | { kind: 'send back' }
  | { kind: 'set aside' }
  | { kind: 'answer' }
  | { kind: 'find' }
  | { kind: 'keys' }

export const LOOK: DeskMode = { kind: 'look' }

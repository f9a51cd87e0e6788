/**
 * What a clerk does is shown at once and sent in order, one at a time, each on the version the one before made. What is not
 * saved yet is kept in the browser, so that a dead line or a closed window loses no settled cell.
 */
import type { Sheet } from '../../../shared/schemas/sheet.ts'
import { ApiError, type ApiIssue } from '../../lib/api-error.ts'
import { bodyOf, type DeskOp, isDoneIn, type SettleBody } from './model/desk-op.ts'

export type Trouble =
  | { kind: 'line'; message: string }
  /** Somebody wrote first: what they changed. */
  | { kind: 'changed'; message: string; issues: readonly ApiIssue[] }
  | { kind: 'refused'; message: string }

export interface SaverState {
  ops: readonly DeskOp[]
  /** What the last write was answered with: it arrives together with the shorter list, so nothing flickers back. */
  answered: Sheet | null
  trouble: Trouble | null
  savedAt: Date | null
}

export interface SaverPorts {
  sheetId: string
  /** The sheet as the server last said. */
  current: () => Sheet | undefined
  put: (sheet: Sheet) => void
  reload: () => Promise<unknown>
  post: (body: SettleBody) => Promise<Sheet>
}

const AGAIN_MS = 5_000
const storeKey = (sheetId: string) => `sheafbook.desk.${sheetId}`

export type DeskSaver = ReturnType<typeof createDeskSaver>

export function createDeskSaver(ports: SaverPorts) {
  let state: SaverState = { ops: keptOps(ports.sheetId), answered: null, trouble: null, savedAt: null }
  let sending = false
  let closed = false
  let timer: ReturnType<typeof setTimeout> | null = null
  const watchers = new Set<() => void>()

  const show = (change: Partial<SaverState>) => {
    state = { ...state, ...change }
    keepOps(ports.sheetId, state.ops)
    for (const told of watchers) told()
  }

  async function run(): Promise<void> {
    if (sending || state.trouble?.kind === 'changed') return
    sending = true
    try {
      while (!closed && state.ops[0] && (await sendOne(state.ops[0]))) {}
    } finally {
      sending = false
    }
  }

  async function sendOne(op: DeskOp): Promise<boolean> {
    const sheet = ports.current()
    if (!sheet) return false
    const body = bodyOf(op, sheet)
    try {
      const answered = body ? await ports.post(body) : state.answered
      if (body && answered) ports.put(answered)
      show({ ops: state.ops.slice(1), answered, trouble: null, savedAt: new Date() })
      return true
    } catch (error) {
      return await troubled(error)
    }
  }

  async function troubled(error: unknown): Promise<boolean> {
    const known = error instanceof ApiError ? error : new ApiError('unknown', 'It could not be saved.')
    if (known.code === 'changed') {
      await ports.reload().catch(() => undefined)
      const [op] = state.ops
      const theirs = ports.current()
      // Both did the same: theirs stands, and there is nothing to ask.
      if (op && theirs && isDoneIn(op, theirs)) {
        show({ ops: state.ops.slice(1), trouble: null })
        return true
      }
      show({ trouble: { kind: 'changed', message: known.message, issues: known.issues } })
      return false
    }
    if (known.status >= 400 && known.status < 500 && known.code !== 'not_signed_in' && known.code !== 'too_many') {
      show({ ops: state.ops.slice(1), trouble: { kind: 'refused', message: known.message } })
      await ports.reload().catch(() => undefined)
      return true
    }
    show({ trouble: { kind: 'line', message: known.message } })
    timer = setTimeout(() => void run(), AGAIN_MS)
    return false
  }

  return {
    subscribe: (told: () => void): (() => void) => {
      watchers.add(told)
      return () => watchers.delete(told)
    },
    state: (): SaverState => state,
    push: (op: DeskOp): void => {
      show({ ops: [...state.ops, op], ...(state.trouble?.kind === 'refused' ? { trouble: null } : {}) })
      void run()
    },
    /** After "somebody changed it": what was typed here stands. */
    insist: (): void => {
      show({ trouble: null })
      void run()
    },
    /** After "somebody changed it": theirs stands, mine is dropped. */
    yieldTo: (): void => {
      show({ ops: state.ops.slice(1), trouble: null })
      void run()
    },
    open: (): (() => void) => {
      closed = false
      void run()
      return () => {
        closed = true
        if (timer) clearTimeout(timer)
      }
    },
  }
}

function keptOps(sheetId: string): DeskOp[] {
  try {
    return JSON.parse(localStorage.getItem(storeKey(sheetId)) ?? '[]') as DeskOp[]
  } catch {
    return []
  }
}

function keepOps(sheetId: string, ops: readonly DeskOp[]): void {
  if (ops.length === 0) localStorage.removeItem(storeKey(sheetId))
  else localStorage.setItem(storeKey(sheetId), JSON.stringify(ops))
}

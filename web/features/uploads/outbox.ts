/**
 * The outbox: every file is kept first and sent second, so that a dead line, a closed browser or an empty battery loses
 * nothing. A file leaves it only when the server has named the same SHA-256.
 */
import type { Upload } from '../../../shared/schemas/upload.ts'
import { ApiError } from '../../lib/api-error.ts'
import { sha256 } from '../../lib/sha256.ts'
import { outboxDb, type WaitingFile } from './outbox-db.ts'
import { sendFile } from './send-file.ts'

export interface OutboxItem {
  id: string
  name: string
  bytes: number
  state: 'waiting' | 'sending'
  /** 0 to 1 while sending. */
  share: number
  /** Why it still waits, once a try failed. */
  problem: string | null
}

export interface OutboxState {
  items: readonly OutboxItem[]
  /** What the server said of files sent since the page was opened, newest first. */
  answers: readonly Upload[]
}

/** What the outbox needs of the world. */
export interface OutboxPorts {
  store: Pick<typeof outboxDb, 'put' | 'get' | 'remove' | 'list'>
  send: typeof sendFile
  /** Calls back after so many milliseconds; answers how to call it off. */
  later: (call: () => void, wait_ms: number) => () => void
  /** Runs the work while nobody else does: two open tabs send each file once. */
  alone: (work: () => Promise<void>) => Promise<void>
}

const AGAIN_MS = 8_000

export function createOutbox({ store, send, later, alone }: OutboxPorts) {
  let state: OutboxState = { items: [], answers: [] }
  let userId: string | null = null
  /** Counts the starts: a stop that comes late must not end the work of the next one. */
  let turn = 0
  let running: Promise<void> | null = null
  let callOff: (() => void) | null = null
  const watchers = new Set<() => void>()

  const show = (change: Partial<OutboxState>) => {
    state = { ...state, ...change }
    for (const told of watchers) told()
  }
  const showItem = (id: string, change: Partial<OutboxItem>) =>
    show({ items: state.items.map((item) => (item.id === id ? { ...item, ...change } : item)) })
  const leave = (id: string) => state.items.filter((item) => item.id !== id)

  function sendAll(): Promise<void> {
    if (!userId) return Promise.resolve()
    callOff?.()
    callOff = null
    show({ items: state.items.map((item) => ({ ...item, problem: null })) })
    running ??= alone(sendEach).finally(() => {
      running = null
    })
    return running
  }

  async function sendEach(): Promise<void> {
    for (let next = firstWaiting(); next; next = firstWaiting()) {
      const file = await store.get(next.id)
      // Sent by another tab meanwhile.
      if (!file) show({ items: leave(next.id) })
      else if (!(await sendOne(file))) return
    }
  }

  const firstWaiting = () => state.items.find((item) => item.state === 'waiting' && item.problem === null)

  /** False when there is no sense in trying the next one now. */
  async function sendOne(file: WaitingFile): Promise<boolean> {
    showItem(file.id, { state: 'sending', share: 0 })
    try {
      const upload = await send(file, (share) => showItem(file.id, { share }))
      if (upload.sha256 !== file.sha256) throw new ApiError('damaged', 'It arrived damaged.')
      await store.remove(file.id)
      show({ items: leave(file.id), answers: [upload, ...state.answers] })
      return true
    } catch (error) {
      const known = error instanceof ApiError ? error : new ApiError('unknown', 'It could not be sent.')
      showItem(file.id, { state: 'waiting', share: 0, problem: known.message })
      callOff ??= later(() => void sendAll(), known.retryAfter_s === null ? AGAIN_MS : known.retryAfter_s * 1000)
      return ofThisFile(known)
    }
  }

  return {
    subscribe: (told: () => void): (() => void) => {
      watchers.add(told)
      return () => watchers.delete(told)
    },
    current: (): OutboxState => state,
    /** Sends what waits, now. Resolves when all was tried. */
    sendAll,

    /** Begins with what this person left here; the answer stops it. */
    start: async (user: string): Promise<() => void> => {
      userId = user
      turn += 1
      const mine = turn
      show({ items: (await store.list(user)).map(toItem), answers: [] })
      void sendAll()
      return () => {
        if (mine !== turn) return
        callOff?.()
        userId = null
      }
    },

    /** Keeps the files, then sends them. Resolves when they are kept. */
    add: async (files: readonly File[], forSheet: string | null): Promise<void> => {
      if (!userId) return
      for (const file of files) {
        const bytes = await file.arrayBuffer()
        const { name, type } = file
        const kept = { id: newId(), userId, name, type, bytes, sha256: await sha256(bytes), forSheet, addedAt: Date.now() }
        await store.put(kept)
        show({ items: [...state.items, toItem(kept)] })
      }
      void sendAll()
    },

    /** Throws away a file that was never sent; a person asked for it. */
    drop: async (id: string): Promise<void> => {
      await store.remove(id)
      show({ items: leave(id) })
    },
  }
}

const toItem = (file: WaitingFile): OutboxItem => ({
  id: file.id,
  name: file.name,
  bytes: file.bytes.byteLength,
  state: 'waiting',
  share: 0,
  problem: null,
})

/** A refusal of one file says nothing of the others; a silent line or a lost session does. */
const ofThisFile = (error: ApiError) =>
  error.status >= 400 && error.status < 500 && error.code !== 'not_signed_in' && error.code !== 'too_many'

/** `crypto.randomUUID` needs https or loopback; this id never leaves the browser. */
const newId = () => `${Date.now().toString(36)}-${Math.random().toString(36).slice(2)}`

export const outbox = createOutbox({
  store: outboxDb,
  send: sendFile,
  later: (call, wait_ms) => {
    const timer = setTimeout(call, wait_ms)
    return () => clearTimeout(timer)
  },
  alone: async (work) => {
    if (navigator.locks) await navigator.locks.request('sheafbook-outbox', work)
    else await work()
  },
})

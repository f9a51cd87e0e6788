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

interface Snapshot {
  items: readonly OutboxItem[]
  /** What the server said of files sent since the page was opened, newest first. */
  answers: readonly Upload[]
}

const AGAIN_MS = 8_000

let snapshot: Snapshot = { items: [], answers: [] }
let userId: string | null = null
let running = false
let timer: ReturnType<typeof setTimeout> | null = null
const watchers = new Set<() => void>()

function show(change: Partial<Snapshot>): void {
  snapshot = { ...snapshot, ...change }
  for (const told of watchers) told()
}

const showItem = (id: string, change: Partial<OutboxItem>) =>
  show({ items: snapshot.items.map((item) => (item.id === id ? { ...item, ...change } : item)) })

export const outbox = {
  subscribe: (told: () => void): (() => void) => {
    watchers.add(told)
    return () => watchers.delete(told)
  },
  current: (): Snapshot => snapshot,

  /** Begins to send what this person left here, now and whenever the line is back. */
  start: async (user: string): Promise<() => void> => {
    userId = user
    const kept = await outboxDb.list(user)
    show({ items: kept.map(toItem), answers: [] })
    window.addEventListener('online', sendAll)
    void sendAll()
    return () => {
      window.removeEventListener('online', sendAll)
      if (timer) clearTimeout(timer)
      userId = null
    }
  },

  /** Keeps the files, then sends them. Resolves when they are kept. */
  add: async (files: readonly File[], forSheet: string | null): Promise<void> => {
    if (!userId) return
    void navigator.storage?.persist?.()
    for (const file of files) {
      const bytes = await file.arrayBuffer()
      const { name, type } = file
      const kept = { id: newId(), userId, name, type, bytes, sha256: await sha256(bytes), forSheet, addedAt: Date.now() }
      await outboxDb.put(kept)
      show({ items: [...snapshot.items, toItem(kept)] })
    }
    void sendAll()
  },

  /** Throws away a file that was never sent; a person asked for it. */
  drop: async (id: string): Promise<void> => {
    await outboxDb.remove(id)
    show({ items: snapshot.items.filter((item) => item.id !== id) })
  },
}

const toItem = (file: WaitingFile): OutboxItem => ({
  id: file.id,
  name: file.name,
  bytes: file.bytes.byteLength,
  state: 'waiting',
  share: 0,
  problem: null,
})

/** `crypto.randomUUID` needs https or loopback; this id never leaves the browser. */
const newId = () => `${Date.now().toString(36)}-${Math.random().toString(36).slice(2)}`

async function sendAll(): Promise<void> {
  if (running || !userId) return
  running = true
  if (timer) clearTimeout(timer)
  timer = null
  try {
    await alone(sendEach)
  } finally {
    running = false
  }
}

/** Two open tabs send each file once. */
const alone = async (work: () => Promise<void>): Promise<void> => {
  if (navigator.locks) await navigator.locks.request('sheafbook-outbox', work)
  else await work()
}

async function sendEach(): Promise<void> {
  for (let next = firstWaiting(); next; next = firstWaiting()) {
    const file = await outboxDb.get(next.id)
    if (!file) {
      show({ items: snapshot.items.filter((item) => item.id !== next?.id) })
      continue
    }
    if (!(await sendOne(file))) return
  }
}

const firstWaiting = () => snapshot.items.find((item) => item.state === 'waiting' && item.problem === null)

/** False when there is no sense in trying the next one now. */
async function sendOne(file: WaitingFile): Promise<boolean> {
  showItem(file.id, { state: 'sending', share: 0 })
  try {
    const upload = await sendFile(file, (share) => showItem(file.id, { share }))
    if (upload.sha256 !== file.sha256) throw new ApiError('damaged', 'It arrived damaged on the way and is sent again.')
    await outboxDb.remove(file.id)
    show({ items: snapshot.items.filter((item) => item.id !== file.id), answers: [upload, ...snapshot.answers] })
    return true
  } catch (error) {
    const known = error instanceof ApiError ? error : new ApiError('unknown', 'It could not be sent.')
    showItem(file.id, { state: 'waiting', share: 0, problem: known.message })
    again(known.retryAfter_s === null ? AGAIN_MS : known.retryAfter_s * 1000)
    return known.status >= 400 && known.status < 500 && known.code !== 'not_signed_in' && known.code !== 'too_many'
  }
}

function again(wait_ms: number): void {
  if (timer) clearTimeout(timer)
  timer = setTimeout(() => {
    show({ items: snapshot.items.map((item) => ({ ...item, problem: null })) })
    void sendAll()
  }, wait_ms)
}

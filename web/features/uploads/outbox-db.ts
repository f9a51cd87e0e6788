/** Photos and files that wait for a line, kept in the browser until the server has confirmed every byte of them. */
import { type DBSchema, type IDBPDatabase, openDB } from 'idb'

export interface WaitingFile {
  id: string
  userId: string
  name: string
  type: string
  /** Bytes rather than a Blob: some phones lose the file behind a stored Blob. */
  bytes: ArrayBuffer
  sha256: string
  /** The sheet it answers, if any. */
  forSheet: string | null
  addedAt: number
}

interface OutboxSchema extends DBSchema {
  files: { key: string; value: WaitingFile }
}

let opened: Promise<IDBPDatabase<OutboxSchema> | null> | null = null
/** Some private windows have no database: files then live as long as the page, which is enough to send them. */
const memory = new Map<string, WaitingFile>()

const db = () => {
  opened ??= openDB<OutboxSchema>('sheafbook-outbox', 1, {
    upgrade: (fresh) => {
      fresh.createObjectStore('files', { keyPath: 'id' })
    },
  }).catch(() => null)
  return opened
}

export const outboxDb = {
  put: async (file: WaitingFile): Promise<void> => {
    const kept = await db()
    if (kept) await kept.put('files', file)
    else memory.set(file.id, file)
  },
  get: async (id: string): Promise<WaitingFile | undefined> => (await db())?.get('files', id) ?? memory.get(id),
  remove: async (id: string): Promise<void> => {
    memory.delete(id)
    await (await db())?.delete('files', id)
  },
  /** A person's own, oldest first. */
  list: async (userId: string): Promise<WaitingFile[]> => {
    const all = (await (await db())?.getAll('files')) ?? [...memory.values()]
    return all.filter((file) => file.userId === userId).sort((a, b) => a.addedAt - b.addedAt)
  },
}

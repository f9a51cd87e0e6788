import { randomUUID } from 'node:crypto'
import { mkdir, open, readdir, rename, rm, stat } from 'node:fs/promises'
import { dirname, join, relative, sep } from 'node:path'
import type { Readable } from 'node:stream'
import { checkKey } from './key.ts'
import { checkRoom, type Room, roomIn, tooFull } from './room.ts'
import type { FileStore } from './store.ts'

/**
 * Keeps files in a local folder.
 * @param look how to see the disk's room; another one lets a test fill the disk
 */
export function createFolderStore(folder: string, look: (folder: string) => Promise<Room> = roomIn): FileStore {
  const place = (key: string) => join(folder, checkKey(key))
  return {
    async put(key, bytes) {
      const target = place(key)
      await mkdir(dirname(target), { recursive: true })
      checkRoom(await look(folder), bytes.byteLength)
      await writeWhole(target, bytes).catch((cause: NodeJS.ErrnoException) => {
        throw cause.code === 'ENOSPC' || cause.code === 'EDQUOT' ? tooFull('no room was left while writing', cause) : cause
      })
    },
    async get(key) {
      const file = await openKept(key, place(key))
      try {
        return await file.readFile()
      } finally {
        await file.close()
      }
    },
    async stream(key): Promise<Readable> {
      return (await openKept(key, place(key))).createReadStream()
    },
    async exists(key) {
      return stat(place(key)).then(
        (entry) => entry.isFile(),
        (cause: NodeJS.ErrnoException) => {
          if (cause.code === 'ENOENT') return false
          throw cause
        },
      )
    },
    async *list() {
      const found = await readdir(folder, { recursive: true, withFileTypes: true }).catch(absentIs([]))
      for (const entry of found.filter((e) => e.isFile())) {
        const path = join(entry.parentPath, entry.name)
        const changed = await stat(path).catch(absentIs(null))
        if (changed) yield { key: relative(folder, path).split(sep).join('/'), changedAt: changed.mtime }
      }
    },
    async remove(key) {
      await rm(place(key), { force: true })
    },
  }
}

/** Nothing is there yet, or not any more. */
const absentIs =
  <T>(value: T) =>
  (cause: NodeJS.ErrnoException): T => {
    if (cause.code === 'ENOENT') return value
    throw cause
  }

async function openKept(key: string, path: string) {
  return open(path, 'r').catch((cause: NodeJS.ErrnoException) => {
    throw cause.code === 'ENOENT' ? new Error(`The store has no file "${key}".`, { cause }) : cause
  })
}

/** Written beside, forced to the disk, then moved: a reader sees the old file or the new one, whenever power goes. */
async function writeWhole(target: string, bytes: Uint8Array): Promise<void> {
  const draft = `${target}.${randomUUID()}.part`
  try {
    const file = await open(draft, 'wx', 0o640)
    try {
      await file.writeFile(bytes)
      await file.sync()
    } finally {
      await file.close()
    }
    await rename(draft, target)
  } catch (cause) {
    await rm(draft, { force: true })
    throw cause
  }
  await syncFolder(dirname(target))
}

/** The move itself is only safe once the folder is on the disk. */
async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r')
  try {
    await handle.sync()
  } finally {
    await handle.close()
  }
}

import type { Readable } from 'node:stream'
import type { StoreSettings } from '../config.ts'
import { createFolderStore } from './folder-store.ts'
import { createS3Store } from './s3-store.ts'

export interface StoredFile {
  key: string
  changedAt: Date
}

/**
 * Where pictures, scans and workbooks are kept. Keys are ours (no file name a person gave): lower-case words,
 * digits, dots and dashes, with slashes between.
 */
export interface FileStore {
  /**
   * Keeps the bytes; when it returns they survive a loss of power. The same key again replaces them as a whole.
   * @throws TransientError when the disk is nearly full (`full`) or the store cannot be reached
   */
  put(key: string, bytes: Uint8Array): Promise<void>
  /** @throws Error when there is nothing under the key: a row that names it has lost its file */
  get(key: string): Promise<Buffer>
  /** The same in pieces, for answers that need not hold the whole file. @throws as `get`, before the first byte */
  stream(key: string): Promise<Readable>
  exists(key: string): Promise<boolean>
  /** Every file there is, in no order; one that comes or goes meanwhile may be missing or named. */
  list(): AsyncIterable<StoredFile>
  /** Removes it; nothing happens when it is gone already. */
  remove(key: string): Promise<void>
}

/** The store the settings name. */
export function createFileStore(settings: StoreSettings): FileStore {
  return settings.kind === 'folder' ? createFolderStore(settings.dir) : createS3Store(settings)
}

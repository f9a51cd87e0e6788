/** The photo reader: one engine a process, picture files in, page readings out. */
import { join } from 'node:path'
import { findLayoutByCode } from '../../../shared/layouts/registry.ts'
import type { Grey } from '../../../shared/reading/pixels/grey.ts'
import { type ReadingTools, readSheet } from '../../../shared/reading/read-sheet.ts'
import type { Facts as KnownFacts } from '../../../shared/reading/weigh/types.ts'
import type { PageReading } from '../../../shared/schemas/page-reading.ts'
import type { Facts } from '../../../shared/trial/facts.ts'
import { assemblePage } from './assemble.ts'
import { decodeGrey } from './decode.ts'
import { createCodeFinder } from './find-codes.ts'
import { createNet } from './net.ts'

export interface PhotoReaderOptions {
  /** The project's folder; the net lies under it. Taken from where the process was started. */
  root?: string
}

export interface ReadHooks {
  /** What registers know of the run. */
  facts?: Facts
  /** Numbers that exist, and the day. */
  known?: KnownFacts
}

export interface PhotoReader {
  /**
   * Reads every page of a picture file.
   * @throws UserError too_large or not_accepted for a file that cannot be opened.
   */
  read(bytes: Uint8Array, file: string, hooks?: ReadHooks): Promise<PageReading[]>
  close(): Promise<void>
}

export async function createPhotoReader(options: PhotoReaderOptions = {}): Promise<PhotoReader> {
  const [findCodes, net] = await Promise.all([
    createCodeFinder(),
    createNet(join(options.root ?? process.cwd(), 'worker/model/digits.onnx')),
  ])
  const tools: ReadingTools = { findCodes, net, layoutOf: findLayoutByCode }

  async function readGrey(grey: Grey, file: string, page: number, decode_ms: number, hooks: ReadHooks): Promise<PageReading> {
    const reading = await readSheet(grey, tools, hooks.known)
    return assemblePage({ file, page }, { ...reading, ms: { decode: decode_ms, ...reading.ms } }, hooks.facts)
  }

  return {
    async read(bytes, file, hooks = {}) {
      const started = performance.now()
      const grey = await decodeGrey(bytes)
      return [await readGrey(grey, file, 1, performance.now() - started, hooks)]
    },
    async close() {},
  }
}

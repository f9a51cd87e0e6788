/** The photo reader: one engine a process, picture files in, page readings out. */
import { join } from 'node:path'
import { findLayout, findLayoutByCode } from '../../../shared/layouts/registry.ts'
import type { Grey, Point } from '../../../shared/reading/pixels/grey.ts'
import { readWithPageCorners } from '../../../shared/reading/read-by-hand.ts'
import { type ReadingTools, readSheet } from '../../../shared/reading/read-sheet.ts'
import type { SheetReading } from '../../../shared/reading/sheet-reading.ts'
import type { Facts as KnownFacts } from '../../../shared/reading/weigh/types.ts'
import type { PageReading } from '../../../shared/schemas/page-reading.ts'
import type { Facts } from '../../../shared/trial/facts.ts'
import { assemblePage } from './assemble.ts'
import { createCodeFinder } from './find-codes.ts'
import { flattenPage } from './flatten.ts'
import { createNet } from './net.ts'
import { openPages } from './pages.ts'
import { createPrintedText } from './printed-text.ts'
import { greyOf, type Raster } from './raster.ts'
import { createTextEngine } from './text-engine.ts'
import { readTyped } from './typed-sheet.ts'

export interface PhotoReaderOptions {
  /** The project's folder; the net lies under it. Taken from where the process was started. */
  root?: string
}

export interface ReadHooks {
  /** What registers know of the run. */
  facts?: Facts
  /** Numbers that exist, and the day. */
  known?: KnownFacts
  /** Only this page of the file, from 1. */
  page?: number
  /** Is handed the flattened page (JPEG, 150 dpi) of each page that was placed. Asking for it decodes in colour. */
  onFlattened?: (page: number, jpeg: Buffer) => Promise<void> | void
  /** Reads the typed block of a planned sheet into `planText` (about half a second). */
  planText?: boolean
}

/** A picture that a clerk has placed by hand. */
export interface ByHand {
  layout: string
  version: number
  sheetCode: string | null
  /** A planned sheet has no number boxes in its head. */
  planned?: boolean
  /** Corners of the paper in pixels of the upright picture, clockwise from the sheet's upper left. */
  corners: readonly [Point, Point, Point, Point]
}

export interface PhotoReader {
  /** How many pages a file holds. @throws UserError as `read`. */
  countPages(bytes: Uint8Array): Promise<number>
  /**
   * Reads every page of a picture or PDF file, or the one asked for.
   * @throws UserError too_large, wrong_kind or not_accepted for a file that cannot be opened.
   */
  read(bytes: Uint8Array, file: string, hooks?: ReadHooks): Promise<PageReading[]>
  /** The same for one page whose corners a person has set. @throws UserError not_found for an unknown layout. */
  readWithCorners(bytes: Uint8Array, file: string, byHand: ByHand, hooks?: ReadHooks): Promise<PageReading>
  close(): Promise<void>
}

export async function createPhotoReader(options: PhotoReaderOptions = {}): Promise<PhotoReader> {
  const [findCodes, net] = await Promise.all([
    createCodeFinder(),
    createNet(join(options.root ?? process.cwd(), 'worker/model/digits.onnx')),
  ])
  const tools: ReadingTools = { findCodes, net, layoutOf: findLayoutByCode }
  const engine = createTextEngine()
  const text = createPrintedText(engine)

  async function finish(
    raster: Raster,
    grey: Grey,
    file: string,
    page: number,
    decode_ms: number,
    reading: SheetReading,
    hooks: ReadHooks,
  ): Promise<PageReading> {
    await readTyped(grey, reading, { engine, net, text }, hooks.known)
    if (hooks.onFlattened && reading.map && reading.layout) {
      const started = performance.now()
      await hooks.onFlattened(page, await flattenPage(raster, reading.map, reading.layout.page))
      reading.ms.flatten = performance.now() - started
    }
    const assembled = assemblePage({ file, page }, { ...reading, ms: { decode: decode_ms, ...reading.ms } }, hooks.facts)
    if (hooks.planText && reading.planned && reading.map && reading.layout) {
      assembled.planText = await text.planLines(grey, reading.map, reading.layout)
    }
    return assembled
  }

  async function withPages<T>(bytes: Uint8Array, use: (pages: Awaited<ReturnType<typeof openPages>>) => Promise<T>): Promise<T> {
    const pages = await openPages(bytes)
    try {
      return await use(pages)
    } finally {
      pages.close()
    }
  }

  return {
    countPages: (bytes) => withPages(bytes, async (pages) => pages.count),

    read: (bytes, file, hooks = {}) =>
      withPages(bytes, async (pages) => {
        const wanted = hooks.page ? [hooks.page] : Array.from({ length: pages.count }, (_, i) => i + 1)
        const readings: PageReading[] = []
        for (const page of wanted) {
          const started = performance.now()
          const raster = await pages.raster(page - 1, hooks.onFlattened !== undefined)
          const grey = greyOf(raster)
          const decode_ms = performance.now() - started
          readings.push(await finish(raster, grey, file, page, decode_ms, await readSheet(grey, tools, hooks.known), hooks))
        }
        return readings
      }),

    readWithCorners: (bytes, file, byHand, hooks = {}) =>
      withPages(bytes, async (pages) => {
        const layout = findLayout(byHand.layout, byHand.version)
        const started = performance.now()
        const page = hooks.page ?? 1
        const raster = await pages.raster(page - 1, hooks.onFlattened !== undefined)
        const grey = greyOf(raster)
        const decode_ms = performance.now() - started
        const reading = await readWithPageCorners(grey, layout, byHand, tools, hooks.known)
        const finished = await finish(raster, grey, file, page, decode_ms, reading, hooks)
        if (!finished.sheet && reading.map && layout) finished.sheet = await text.sheetCode(grey, reading.map, layout)
        return finished
      }),

    close: () => engine.close(),
  }
}

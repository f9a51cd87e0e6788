/**
 * Reads one sheet from one grey picture: find, align, cut, recognise, weigh. Pure: the code finder and the digit net are handed
 * in, so it runs in a browser as well as in the worker.
 */
import type { Layout } from '../layouts/layout.ts'
import { alignPage } from './align/align-page.ts'
import type { Picture } from './align/patch.ts'
import type { DigitNet } from './classes.ts'
import { type Homography, type Pair, project, scaleAt } from './geometry/homography.ts'
import { makePageMap } from './geometry/page-map.ts'
import type { CodeFinder } from './locate/code-finder.ts'
import { findSheet } from './locate/find-corners.ts'
import { type TakeAgain, takeAgain } from './locate/take-again.ts'
import { type Grey, halve } from './pixels/grey.ts'
import { paperLevel } from './pixels/paper.ts'
import { judgeNothingFound, judgePlacing, LEAST_PX_PER_MM } from './quality.ts'
import { readCells } from './read-cells.ts'
import type { SheetReading, Timings } from './sheet-reading.ts'
import type { Facts } from './weigh/types.ts'

export interface ReadingTools {
  findCodes: CodeFinder
  net: DigitNet
  layoutOf: (code: string, version: number) => Layout | null
}

/** A sheet whose corners are known. */
export interface Located {
  layout: Layout
  sheetCode: string | null
  planned: boolean
  /** Layout mm to px of the full picture. */
  homography: Homography
  /** Points of the corner codes that were found. */
  pairs: Pair[]
  corners: number[]
}

/** Fields are measured at about this resolution: finer costs time and gains nothing. */
const MEASURE_PX_PER_MM = 9
/** Cells are cut from a picture a little finer than they are (5 px/mm); finer than this costs time and gains nothing. */
const CUT_PX_PER_MM = 5.25
/** Side of a block of the paper map, mm. */
const PAPER_BLOCK_MM = 2

const nothing = (again: TakeAgain, ms: Timings): SheetReading => ({
  layout: null,
  sheetCode: null,
  planned: false,
  takeAgain: again,
  readings: new Map(),
  map: null,
  quality: null,
  ms,
})

export class Stopwatch {
  readonly ms: Timings = {}
  private last = performance.now()

  lap(stage: string): void {
    const now = performance.now()
    this.ms[stage] = (this.ms[stage] ?? 0) + now - this.last
    this.last = now
  }
}

export async function readSheet(full: Grey, tools: ReadingTools, facts: Facts = {}): Promise<SheetReading> {
  const watch = new Stopwatch()
  const half = halve(full)
  const outcome = await findSheet(full, half, tools.findCodes, tools.layoutOf)
  watch.lap('locate')
  if (outcome.kind === 'none') return nothing(judgeNothingFound(half, paperLevel(half, 16)), watch.ms)
  if (outcome.kind !== 'found') return nothing(takeAgain(outcome.kind), watch.ms)
  const { layout, code, corners, homography } = outcome.sheet
  const located: Located = {
    layout,
    sheetCode: code.sheetCode,
    planned: code.planned,
    homography,
    pairs: corners.flatMap((c) => c.pairs),
    corners: corners.map((c) => c.corner),
  }
  return readLocated(full, half, located, tools, facts, watch)
}

export async function readLocated(
  full: Grey,
  half: Grey,
  located: Located,
  tools: Pick<ReadingTools, 'net'>,
  facts: Facts = {},
  watch = new Stopwatch(),
): Promise<SheetReading> {
  const { layout, planned, sheetCode, homography } = located
  const { width, height } = layout.page
  const px_per_mm = scaleAt(homography, width / 2, height / 2)
  const base = { layout, sheetCode, planned, readings: new Map(), map: null, quality: null, ms: watch.ms }
  if (!(px_per_mm >= LEAST_PX_PER_MM)) return { ...base, takeAgain: takeAgain('too small') }

  const scale = px_per_mm > MEASURE_PX_PER_MM ? half.width / full.width : 1
  const grey = scale === 1 ? full : half
  const paper = paperLevel(grey, PAPER_BLOCK_MM * px_per_mm * scale)
  watch.lap('paper')
  const alignment = alignPage({ grey, paper }, scale, layout, planned, located.pairs, homography)
  watch.lap('align')
  const at = (x: number, y: number) => project(alignment.homography, x, y)
  const pageCorners = [at(0, 0), at(width, 0), at(width, height), at(0, height)]
  const again = judgePlacing({
    page: layout.page,
    picture: { grey, paper },
    scale,
    alignment,
    corners: located.corners,
    pageCorners,
  })
  const quality = {
    px_per_mm,
    edge_mm: alignment.edge_mm,
    foundShare: alignment.foundShare,
    corners: located.corners.length,
    paper: paper.level.data.reduce((sum, v) => sum + v, 0) / paper.level.data.length,
  }
  if (again) return { ...base, takeAgain: again, quality }
  const picture: Picture =
    scale * px_per_mm >= CUT_PX_PER_MM
      ? { grey, paper, shrunk: scale }
      : { grey: full, paper: { ...paper, block_px: paper.block_px / scale } }
  const readings = await readCells(picture, alignment, layout, planned, tools.net, facts, watch)
  const map = makePageMap(alignment.homography, alignment.anchors, layout.page)
  watch.lap('map')
  return { ...base, takeAgain: null, readings, map, quality }
}

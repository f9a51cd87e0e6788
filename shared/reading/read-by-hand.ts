/** Reads a picture whose paper corners a person has set, when the corner codes could not be found. */
import { UserError } from '../errors.ts'
import type { Layout } from '../layouts/layout.ts'
import { fitHomography } from './geometry/homography.ts'
import { placeCodes } from './locate/find-corners.ts'
import { type Grey, halve, type Point } from './pixels/grey.ts'
import { type ReadingTools, readLocated } from './read-sheet.ts'
import type { SheetReading } from './sheet-reading.ts'
import type { Facts } from './weigh/types.ts'

export interface PageCorners {
  sheetCode: string | null
  planned?: boolean
  /** In pixels, clockwise from the sheet's upper left. */
  corners: readonly [Point, Point, Point, Point]
}

/**
 * Codes are still looked for where the corners say they are; without them the corners alone begin the alignment.
 * @throws UserError not_found without a layout, invalid when the corners do not span a page.
 */
export async function readWithPageCorners(
  full: Grey,
  layout: Layout | null,
  { sheetCode, planned = false, corners }: PageCorners,
  tools: ReadingTools,
  facts: Facts = {},
): Promise<SheetReading> {
  if (!layout) throw new UserError('not_found', 'There is no such layout. Choose one from the list.')
  const { width, height } = layout.page
  const paper = [
    { x: 0, y: 0 },
    { x: width, y: 0 },
    { x: width, y: height },
    { x: 0, y: height },
  ]
  const pairs = paper.map((from, i) => ({ from, to: corners[i]! }))
  const homography = fitHomography(pairs)
  if (!homography) throw new UserError('invalid', 'The four corners lie on one line. Set them on the corners of the paper.')
  const half = halve(full)
  const located = await placeCodes(full, half, tools.findCodes, layout, homography, { sheetCode, planned })
  const best = located.homography ?? homography
  return readLocated(
    full,
    half,
    {
      layout,
      sheetCode: located.sheetCode ?? sheetCode,
      planned: located.planned,
      homography: best,
      pairs: located.pairs.length > 0 ? located.pairs : pairs,
      corners: located.corners,
    },
    tools,
    facts,
  )
}

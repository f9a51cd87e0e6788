/** Covers, in a flattened picture, what shows who a person is. */
import { type Box, cellBounds } from '../../shared/layouts/geometry.ts'
import type { Layout } from '../../shared/layouts/layout.ts'
import { FARMER_LINE } from './plan-lines.ts'

/** Ink runs over the lines it is asked to stay in, most of all upwards. */
const MARGIN_MM = { x: 1.5, above: 3, below: 1.5 }
const COVER = '#d9d2c3'

/**
 * Places on the page, in millimetres: signatures and names, and the farmer's line of the typed block, which only a planned
 * sheet has; a blank one has boxes to write in there.
 */
export function personalAreas(layout: Layout, planned: boolean): Box[] {
  const cells = layout.cells.filter((cell) => 'personal' in cell && cell.personal).map(cellBounds)
  const { x, y, columnWidth, rows, rowHeight } = layout.planBlock
  const farmer = {
    x: x + Math.floor(FARMER_LINE / rows) * columnWidth,
    y: y + (FARMER_LINE % rows) * rowHeight - 0.6,
    width: columnWidth,
    height: rowHeight,
  }
  const widened = cells.map((box) => ({
    x: box.x - MARGIN_MM.x,
    y: box.y - MARGIN_MM.above,
    width: box.width + 2 * MARGIN_MM.x,
    height: box.height + MARGIN_MM.above + MARGIN_MM.below,
  }))
  return planned ? [...widened, farmer] : widened
}

/** @param picture a JPEG of the whole page, flattened onto the layout */
export async function blankAreas(picture: Buffer, layout: Layout, planned: boolean): Promise<Buffer> {
  const { default: sharp } = await import('sharp')
  const { width, height } = await sharp(picture).metadata()
  const across = width / layout.page.width
  const down = height / layout.page.height
  const covers = personalAreas(layout, planned).map((box) => {
    const left = Math.max(0, Math.floor(box.x * across))
    const top = Math.max(0, Math.floor(box.y * down))
    const right = Math.min(width, Math.ceil((box.x + box.width) * across))
    const bottom = Math.min(height, Math.ceil((box.y + box.height) * down))
    const create = { width: right - left, height: bottom - top, channels: 3 as const, background: COVER }
    return { input: { create }, left, top }
  })
  return sharp(picture).composite(covers).jpeg({ quality: 88 }).toBuffer()
}

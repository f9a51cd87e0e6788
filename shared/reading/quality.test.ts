import { describe, expect, test } from 'vitest'
import type { Alignment } from './align/align-page.ts'
import type { Grey } from './pixels/grey.ts'
import { paperLevel } from './pixels/paper.ts'
import { judgePlacing, type PlacedPage } from './quality.ts'

const PAGE = { width: 210, height: 297 }
const PX_PER_MM = 4

/** A picture of paper at a level, its lower part at another from a line (mm) on. */
function paper(level: number, below?: { from_mm: number; level: number }): Grey {
  const [width, height] = [PAGE.width * PX_PER_MM, PAGE.height * PX_PER_MM]
  const data = new Uint8Array(width * height).fill(level)
  if (below) data.fill(below.level, below.from_mm * PX_PER_MM * width)
  return { width, height, data }
}

/** The page's fields every 15 mm, shifted in the picture; `isLost` says which were not found. */
function placed(grey: Grey, isLost: (x: number, y: number) => boolean, more: Partial<PlacedPage> & { shift_mm?: number } = {}) {
  const shift_px = (more.shift_mm ?? 0) * PX_PER_MM
  const parts = Array.from({ length: 13 * 19 }, (_, i) => {
    const center = { x: 12 + 15 * (i % 13), y: 12 + 15 * Math.floor(i / 13) }
    return { center, found: !isLost(center.x, center.y) }
  })
  const alignment = {
    homography: [PX_PER_MM, 0, shift_px, 0, PX_PER_MM, 0, 0, 0, 1],
    parts,
    foundShare: parts.filter((p) => p.found).length / parts.length,
    edge_mm: 0.3,
    ahead: 0.4,
    blacks: [],
    anchors: [],
  } as unknown as Alignment
  const corner = (x: number, y: number) => ({ x: x * PX_PER_MM + shift_px, y: y * PX_PER_MM })
  const { width, height } = PAGE
  return judgePlacing({
    page: PAGE,
    picture: { grey, paper: paperLevel(grey, 2 * PX_PER_MM) },
    scale: 1,
    alignment,
    corners: [0, 1, 2, 3],
    pageCorners: [corner(1, 1), corner(width - 1, 1), corner(width - 1, height - 1), corner(1, height - 1)],
    ...more,
  })
}

describe('a page whose fields were not all found', () => {
  test('is read when nearly all were', () => expect(placed(paper(200), (x, y) => x < 20 && y < 100)).toBeNull())

  test('is mirrored where the lost fields lie in white light', () => {
    const lit = paper(180, { from_mm: 200, level: 255 })
    expect(placed(lit, (_, y) => y > 200)?.code).toBe('glare')
  })

  test('is outside the picture, not mirrored, where bright paper ends at the picture', () => {
    const outside = placed(paper(252), (x) => x > 110, { shift_mm: 100, corners: [0, 3] })
    expect(outside?.advice).toMatch(/^The upper right and lower right corners are outside the picture/)
  })

  test('names the corners outside alone when another is covered', () => {
    const both = placed(paper(200), (x) => x > 110, { shift_mm: 100, corners: [3] })
    expect(both?.advice).toMatch(/^The upper right and lower right corners are outside/)
  })

  test('is covered where they lie together', () => {
    expect(placed(paper(200), (x, y) => x < 80 && y > 200)).toMatchObject({
      code: 'covered',
      advice: expect.stringMatching(/at the lower left of the sheet/),
    })
  })

  test('lies badly where they are scattered on grey print', () => {
    const printed = paper(200)
    for (let i = 0; i < printed.data.length; i += 7) printed.data[i] = i % 2 ? 40 : 160
    expect(placed(printed, (x, y) => (x + y) % 2 === 0)?.code).toBe('cannot place')
  })

  test('is too dark before anything else', () => expect(placed(paper(30), (x) => x > 100)?.code).toBe('too dark'))
})

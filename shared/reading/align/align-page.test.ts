import { expect, test } from 'vitest'
import { cellBounds } from '../../layouts/geometry.ts'
import { LAYOUTS } from '../../layouts/registry.ts'
import { fitHomography, invert, project } from '../geometry/homography.ts'
import { ResidualField } from '../geometry/residual-field.ts'
import { paperLevel } from '../pixels/paper.ts'
import { drawGrey, layoutRects } from '../testing/draw.ts'
import { alignPage } from './align-page.ts'
import { isTraced } from './trace-rules.ts'

const SIZE = { width: 1400, height: 1900 }

/** Any layout there is: reading knows none by name. */
test.each(LAYOUTS)('$key $version: every field of a tilted page with waves of 1.5 mm is placed to 0.12 mm', (layout) => {
  const { width, height } = layout.page
  const paper = [
    { x: 0, y: 0 },
    { x: width, y: 0 },
    { x: width, y: height },
    { x: 0, y: height },
  ]
  const seen = [
    { x: 90, y: 60 },
    { x: 1320, y: 110 },
    { x: 1290, y: 1830 },
    { x: 60, y: 1790 },
  ]
  const h = fitHomography(paper.map((from, i) => ({ from, to: seen[i]! })))!
  const back = invert(h)
  const wave = (x: number, y: number) => ({ dx: 0.4 * Math.sin(y / 60), dy: 1.5 * Math.sin((x / width) * 4 + y / 120) })
  const grey = drawGrey(
    SIZE,
    layoutRects(layout),
    (px, py) => {
      const flat = project(back, px, py)
      let at = flat
      for (let i = 0; i < 2; i++) {
        const d = wave(at.x, at.y)
        at = { x: flat.x - d.dx, y: flat.y - d.dy }
      }
      return at
    },
    layout.page,
    2,
  )
  const pairs = layout.codes.flatMap(({ x, y, size }) =>
    [0, 1].flatMap((v) =>
      [0, 1].map((u) => {
        const from = { x: x + u * size, y: y + v * size }
        const d = wave(from.x, from.y)
        return { from, to: project(h, from.x + d.dx, from.y + d.dy) }
      }),
    ),
  )
  const picture = { grey, paper: paperLevel(grey, 12) }
  const alignment = alignPage(picture, 1, layout, false, pairs, fitHomography(pairs)!)
  expect(alignment.foundShare).toBeGreaterThanOrEqual(0.99)
  for (const { part, center, displacement } of alignment.parts) {
    const d = wave(center.x, center.y)
    const truth = project(h, center.x + d.dx, center.y + d.dy)
    const own = project(alignment.homography, center.x + displacement.dx, center.y + displacement.dy)
    expect(Math.hypot(own.x - truth.x, own.y - truth.y) / 5.8, `${part.key} ${part.part}`).toBeLessThan(0.12)
  }
  const field = new ResidualField(alignment.anchors)
  for (const cell of layout.cells.filter(({ kind }) => kind === 'signature')) {
    const { x, y, width, height } = cellBounds(cell)
    const line = { y: y + height, left: x, right: x + width }
    expect(isTraced(alignment.anchors, line), cell.key).toBe(true)
    for (const at of [line.left, line.right]) {
      const d = wave(at, line.y)
      const truth = project(h, at + d.dx, line.y + d.dy)
      const seen = field.at({ x: at, y: line.y })
      const own = project(alignment.homography, at + seen.dx, line.y + seen.dy)
      expect(Math.abs(own.y - truth.y) / 5.8, `line of ${cell.key}`).toBeLessThan(0.2)
    }
  }
})

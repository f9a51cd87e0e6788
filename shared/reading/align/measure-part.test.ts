import { expect, test } from 'vitest'
import type { CombCell } from '../../layouts/layout.ts'
import { paperLevel } from '../pixels/paper.ts'
import { combRects, drawGrey } from '../testing/draw.ts'
import { fieldParts } from './field-lines.ts'
import { frameContrast } from './lines.ts'
import { fieldPatch, measureParts, stepFor } from './measure-part.ts'

const PX_PER_MM = 7
const PAGE = { width: 90, height: 40 }
const comb = (format: string): CombCell => ({
  kind: 'digits',
  key: 'x',
  label: 'x',
  need: 'mandatory',
  section: 1,
  unit: null,
  x: 20,
  y: 15,
  format,
})

/** The comb printed (dx, dy) away from its place, leaning and stretched about its own start. */
function measured(format: string, dx: number, dy: number, reach_mm: number, lean = 0, stretch = 0) {
  const cell = comb(format)
  const middle = { x: cell.x + 12, y: cell.y + 3.5 }
  const grey = drawGrey(
    { width: PAGE.width * PX_PER_MM, height: PAGE.height * PX_PER_MM },
    combRects(cell),
    (px, py) => {
      const x = middle.x + (px / PX_PER_MM - dx - middle.x) / (1 + stretch)
      return { x, y: py / PX_PER_MM - dy - lean * (x - middle.x) }
    },
    PAGE,
  )
  const picture = { grey, paper: paperLevel(grey, 2 * PX_PER_MM) }
  const parts = fieldParts(cell)
  const { field } = parts[0]!
  const center = { x: field.x + field.width / 2, y: field.y + field.height / 2 }
  const none = { dx: 0, dy: 0, dxx: 0, dxy: 0, dyx: 0, dyy: 0 }
  const map = { homography: [PX_PER_MM, 0, 0, 0, PX_PER_MM, 0, 0, 0, 1], center, displacement: none }
  return measureParts(fieldPatch(picture, map, field, reach_mm, stepFor(PX_PER_MM)), parts, reach_mm, frameContrast(0.2))
}

test.each(['999', '9999', '99.9', '99:99'])('a comb %s printed 0.8 mm right and 0.5 mm low is found there', (format) => {
  for (const fit of measured(format, 0.8, 0.5, 1.5)) {
    expect(fit.dx).toBeCloseTo(0.8, 1)
    expect(fit.dy).toBeCloseTo(0.5, 1)
    expect(Math.min(fit.supportX, fit.supportY)).toBeGreaterThan(0.6)
  }
})

test('a comb that leans or is stretched is found with its lean and stretch', () => {
  const [leaning] = measured('9999', 0.1, 0, 1, 0.03)
  expect(leaning!.lean).toBeCloseTo(0.03, 2)
  const [wide] = measured('9999', 0, 0, 1, 0, 0.05)
  expect(wide!.stretch).toBeCloseTo(0.05, 1)
})

test.each(['9999', '99.9'])('a comb %s one box off does not pass for the comb: its bars and gaps stand elsewhere', (format) => {
  const off = measured(format, 5.6, 0, 0.7)
  const right = measured(format, 0, 0, 0.7)
  expect(right[0]!.ahead).toBeGreaterThan(0.3)
  // A page whose combs are ahead by less than 0.15 (median) is refused as a whole.
  expect(off[0]!.ahead).toBeLessThan(0.1)
})

import { expect, test } from 'vitest'
import { makePageMap, toPhoto } from './page-map.ts'
import { type Anchor, displacementAt } from './residual-field.ts'

const grid = (at: (x: number, y: number) => { dx: number; dy: number }): Anchor[] =>
  Array.from({ length: 9 * 12 }, (_, i) => ({ x: 10 + (i % 9) * 23, y: 10 + Math.floor(i / 9) * 25 })).map(({ x, y }) => ({
    x,
    y,
    ...at(x, y),
    weight: 1,
  }))

test('between anchors a wave of a millimetre and a half is followed to 0.15 mm', () => {
  const wave = (x: number, y: number) => ({ dx: 0.4 * Math.sin(y / 40), dy: 1.5 * Math.sin(x / 50 + y / 90) })
  const anchors = grid(wave)
  for (let x = 20; x < 190; x += 13) {
    for (let y = 20; y < 270; y += 17) {
      const d = displacementAt(anchors, { x, y })
      const truth = wave(x, y)
      expect(Math.hypot(d.dx - truth.dx, d.dy - truth.dy)).toBeLessThan(0.15)
    }
  }
})

test('a plane is met exactly, slopes included', () => {
  const d = displacementAt(
    grid((x, y) => ({ dx: 1 + 0.01 * x, dy: 0.02 * y - 0.5 })),
    { x: 105, y: 150 },
  )
  expect(d.dx).toBeCloseTo(2.05, 1)
  expect(d.dy).toBeCloseTo(2.5, 1)
  expect(d.dxx).toBeCloseTo(0.01, 2)
  expect(d.dyy).toBeCloseTo(0.02, 2)
})

test('a line that only tells height says nothing of left and right', () => {
  const anchors = grid(() => ({ dx: 0.2, dy: 0.2 }))
  const lines = [{ x: 100, y: 150, dx: 9, dy: 0.2, weight: 5, onlyDown: true as const }]
  expect(displacementAt([...anchors, ...lines], { x: 100, y: 150 }).dx).toBeCloseTo(0.2, 3)
})

test('the stored map takes a place where the field and the perspective take it', () => {
  const h = [10, 0, 50, 0, 10, 60, 0, 0, 1]
  const map = makePageMap(
    h,
    grid(() => ({ dx: 0.5, dy: -0.25 })),
    { width: 210, height: 297 },
  )
  const p = toPhoto(map, 100, 200)
  expect(p.x).toBeCloseTo(50 + 1005, 1)
  expect(p.y).toBeCloseTo(60 + 1997.5, 1)
})

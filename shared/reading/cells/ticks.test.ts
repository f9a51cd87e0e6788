import { expect, test } from 'vitest'
import { paperLevel } from '../pixels/paper.ts'
import { drawGrey, tickRects } from '../testing/draw.ts'
import { measureTick, tickDist, tickHabit } from './ticks.ts'

const PX = 8
const PAGE = { width: 20, height: 20 }
const BOX = { x: 8, y: 8, width: 4.2, height: 4.2 }
const MAP = {
  homography: [PX, 0, 0, 0, PX, 0, 0, 0, 1],
  center: { x: 10, y: 10 },
  displacement: { dx: 0, dy: 0, dxx: 0, dxy: 0, dyx: 0, dyy: 0 },
}

/** Strokes from point to point, drawn as many small squares of the pen's width. */
function ink(strokes: ReadonlyArray<readonly [number, number, number, number]>, width = 0.5) {
  const rects = strokes.flatMap(([x1, y1, x2, y2]) =>
    Array.from({ length: 60 }, (_, i) => {
      const t = i / 59
      return { x: x1 + t * (x2 - x1) - width / 2, y: y1 + t * (y2 - y1) - width / 2, width, height: width, darkness: 0.8 }
    }),
  )
  const grey = drawGrey(
    { width: 160, height: 160 },
    [...tickRects(BOX.x, BOX.y), ...rects],
    (x, y) => ({ x: x / PX, y: y / PX }),
    PAGE,
  )
  return measureTick({ grey, paper: paperLevel(grey, 16) }, MAP, BOX, 0.9)
}

const CHECK = [
  [8.8, 10, 9.8, 11.6],
  [9.8, 11.6, 12.4, 7.4],
] as const
const empty = ink([])
const check = ink(CHECK)
const cross = ink([
  [8.6, 8.6, 11.8, 11.8],
  [11.8, 8.6, 8.6, 11.8],
])
const crossedOut = ink([...CHECK, [7.6, 9.4, 12.8, 9.5], [7.6, 10.4, 12.8, 10.3]])
const habit = tickHabit([empty, empty, empty, empty, check, check, check, cross])

test('frame and heavy corner are no ink, a check and a cross are', () => {
  expect(empty.ink_mm2).toBeLessThan(0.05)
  expect(tickDist(empty, habit).empty).toBeGreaterThan(0.995)
  expect(tickDist(check, habit).ticked).toBeGreaterThan(0.995)
  expect(tickDist(cross, habit).ticked).toBeGreaterThan(0.99)
})

test('a tick with lines through it is neither', () => {
  expect(tickDist(crossedOut, habit).spoiled).toBeGreaterThan(0.5)
})

test('on a page without a tick an empty box is empty', () => {
  const none = tickHabit([empty, empty, empty])
  expect(tickDist(empty, none).empty).toBeGreaterThan(0.995)
})

test('the three chances add up to 1', () => {
  for (const dist of [empty, check, cross, crossedOut].map((i) => tickDist(i, habit))) {
    expect(dist.empty + dist.ticked + dist.spoiled).toBeCloseTo(1, 9)
  }
})

test('a line out on both sides takes back a cross that fills its box', () => {
  const crosses = tickHabit([empty, empty, empty, cross, cross, cross])
  const lined = ink([
    [8.6, 8.6, 11.8, 11.8],
    [11.8, 8.6, 8.6, 11.8],
    [6.9, 10, 13.4, 10.2],
  ])
  expect(lined.through).toBe(true)
  expect(cross.through).toBe(false)
  expect(tickDist(lined, crosses).ticked).toBeLessThan(0.99)
})

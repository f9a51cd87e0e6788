import { expect, test } from 'vitest'
import { tickContrast } from '../align/measure-tick.ts'
import type { Grey } from '../pixels/grey.ts'
import { paperLevel } from '../pixels/paper.ts'
import { drawGrey, tickRects } from '../testing/draw.ts'
import { chanceFrom, dimmed, lightened } from '../testing/light.ts'
import { fading, isVisible, leftOpen, usualContrast } from './tick-print.ts'
import { measureTick, tickDist, tickHabit } from './ticks.ts'

const PX = 8
const PAGE = { width: 100, height: 16 }
/** Six boxes in a row, the first, third and last of them ticked. */
const BOXES = Array.from({ length: 6 }, (_, i) => ({ x: 6 + 16 * i, y: 6, width: 4.2, height: 4.2 }))
const TICKED = [true, false, true, false, false, true]
const MAP = {
  homography: [PX, 0, 0, 0, PX, 0, 0, 0, 1],
  center: { x: 50, y: 8 },
  displacement: { dx: 0, dy: 0, dxx: 0, dxy: 0, dyx: 0, dyy: 0 },
}

const strokes = BOXES.filter((_, i) => TICKED[i]).flatMap(({ x, y }) =>
  Array.from({ length: 60 }, (_, i) => {
    const [dx, dy] = i < 20 ? [0.8 + i / 20, 2 + (1.6 * i) / 20] : [1.8 + (2.4 * (i - 20)) / 40, 3.6 - (4 * (i - 20)) / 40]
    return { x: x + dx - 0.25, y: y + dy - 0.25, width: 0.5, height: 0.5, darkness: 0.8 }
  }),
)
const page = drawGrey(
  { width: PAGE.width * PX, height: PAGE.height * PX },
  [...BOXES.flatMap((b) => tickRects(b.x, b.y)), ...strokes],
  (x, y) => ({ x: x / PX, y: y / PX }),
  PAGE,
)

function read(grey: Grey) {
  const picture = { grey, paper: paperLevel(grey, 16) }
  const contrasts = BOXES.map((box) => tickContrast(picture, MAP, box))
  const usual = usualContrast(contrasts)
  const inks = BOXES.map((box, i) => measureTick(picture, MAP, box, 0.9 * fading(contrasts[i]!, usual)))
  const habit = tickHabit(inks)
  return inks.map((ink, i) => ({ ...tickDist(ink, habit), visible: isVisible(contrasts[i]!, usual) }))
}

/** Light over the last box alone. */
const glare = (share: number) => lightened(page, share, { x: 82 * PX, y: 0, width: 18 * PX, height: 16 * PX })

test('every box of a fair picture is seen, ink across its frame or not', () => {
  const boxes = read(page)
  expect(boxes.map((b) => b.visible)).toEqual(BOXES.map(() => true))
  expect(boxes.map((b) => b.ticked > 0.995)).toEqual(TICKED)
})

test('a tick that light has paled is measured against the frame beside it', () => {
  const last = read(glare(0.55))[5]!
  expect(last.visible).toBe(true)
  expect(last.ticked).toBeGreaterThan(0.995)
})

test('a box that light has washed out is not seen, and so never surely empty', () => {
  const boxes = read(glare(0.85))
  expect(boxes.map((b) => b.visible)).toEqual([true, true, true, true, true, false])
  const open = leftOpen({ empty: 1, ticked: 0, spoiled: 0 })
  expect(open.empty).toBeLessThan(0.9)
  expect(open.empty + open.ticked + open.spoiled).toBeCloseTo(1, 9)
})

test('on a page where all print is lost in the dark no box is seen', () => {
  const boxes = read(dimmed(lightened(page, 0.9), 0.3, 5, chanceFrom(5)))
  expect(boxes.some((b) => b.visible)).toBe(false)
})

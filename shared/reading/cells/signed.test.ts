import { expect, test } from 'vitest'
import type { Grey } from '../pixels/grey.ts'
import { paperLevel } from '../pixels/paper.ts'
import { drawGrey } from '../testing/draw.ts'
import { chanceFrom, dimmed, lightened } from '../testing/light.ts'
import { inkWithin, signedBy } from './signed.ts'

const PX = 8
const PAGE = { width: 45, height: 16 }
const BOX = { x: 5, y: 4, width: 35, height: 8 }
const MAP = {
  homography: [PX, 0, 0, 0, PX, 0, 0, 0, 1],
  center: { x: 22, y: 8 },
  displacement: { dx: 0, dy: 0, dxx: 0, dxy: 0, dyx: 0, dyy: 0 },
}

/** The area with its line, `down` mm from where it is thought to be; signed in waves or not. */
function area(signed: boolean, down = 0): Grey {
  const line = { x: BOX.x, y: BOX.y + BOX.height + down - 0.11, width: BOX.width, height: 0.22, darkness: 0.85 }
  const strokes = Array.from({ length: signed ? 700 : 0 }, (_, i) => ({
    x: 9 + i / 28,
    y: 8 + down + 2.2 * Math.sin(i / 17),
    width: 0.5,
    height: 0.5,
    darkness: 0.7,
  }))
  return drawGrey({ width: 45 * PX, height: 16 * PX }, [line, ...strokes], (x, y) => ({ x: x / PX, y: y / PX }), PAGE)
}

const judge = (grey: Grey) => signedBy(inkWithin({ grey, paper: paperLevel(grey, 16) }, MAP, BOX, 0.9))

test('a signature and an empty area are told apart, wherever the line stands', () => {
  for (const down of [-1.2, 0, 1.2]) {
    expect(judge(area(true, down))).toEqual({ signed: true, sure: true, hidden: false })
    expect(judge(area(false, down))).toEqual({ signed: false, sure: true, hidden: false })
  }
})

test('the grain of a dark picture is no signature', () => {
  expect(judge(dimmed(area(false), 0.35, 9, chanceFrom(3)))).toMatchObject({ signed: false, sure: true })
})

test('an area that mirrors the light is not known to be empty', () => {
  expect(judge(lightened(area(true), 0.85))).toMatchObject({ sure: false, hidden: true })
  expect(judge(lightened(area(false), 0.85))).toMatchObject({ sure: false, hidden: true })
})

import { expect, test } from 'vitest'
import { cornerModules } from '../../layouts/corner-modules.ts'
import { makeSheetCode } from '../../layouts/sheet-code.ts'
import { project } from '../geometry/homography.ts'
import { drawGrey } from '../testing/draw.ts'
import { correlate, makePattern, registerPattern } from './register-code.ts'

const code = { layoutCode: 'TI', version: 1, corner: 2, planned: false, sheetCode: makeSheetCode((below) => 7 % below) }
const modules = cornerModules(code)
const PX = 6
/** The code printed with its upper left at (10, 10) modules. */
const rects = modules.flatMap((row, y) =>
  row.flatMap((dark, x) => (dark ? [{ x: 10 + x, y: 10 + y, width: 1, height: 1, darkness: 0.9 }] : [])),
)
const grey = drawGrey({ width: 252, height: 252 }, rects, (x, y) => ({ x: x / PX, y: y / PX }), { width: 42, height: 42 })
const pattern = makePattern(modules)
const TRUE_PLACE = [PX, 0, 10 * PX, 0, PX, 10 * PX, 0, 0, 1]

test('a code half a module off, turned and scaled, is set back: its middle to a sixth of a pixel, its corners to an eighth of a module', () => {
  const start = [PX * 1.01, 0.1, 10 * PX + 2.6, -0.08, PX * 0.99, 10 * PX - 2.2, 0, 0, 1]
  const registered = registerPattern(grey, pattern, start)!
  expect(registered.correlation).toBeGreaterThan(0.9)
  const off = (x: number, y: number) => {
    const got = project(registered.toPhoto, x, y)
    const truth = project(TRUE_PLACE, x, y)
    return Math.hypot(got.x - truth.x, got.y - truth.y)
  }
  expect(off(10.5, 10.5)).toBeLessThan(0.15)
  for (const x of [0, 21]) for (const y of [0, 21]) expect(off(x, y)).toBeLessThan(0.12 * PX)
})

test('another code of the same size is not like it', () => {
  const other = makePattern(cornerModules({ ...code, sheetCode: makeSheetCode((below) => 19 % below) }))
  expect(correlate(grey, other, TRUE_PLACE)).toBeLessThan(0.8)
  expect(correlate(grey, pattern, TRUE_PLACE)).toBeGreaterThan(0.9)
})

test('blank paper holds no code', () => {
  const blank = { ...grey, data: new Uint8Array(grey.data.length).fill(200) }
  expect(registerPattern(blank, pattern, TRUE_PLACE)).toBeNull()
})

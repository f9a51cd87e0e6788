import { readFile } from 'node:fs/promises'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { createPhotoReader, type PhotoReader } from '../../worker/readers/photo/read-page.ts'

let reader: PhotoReader
beforeAll(async () => {
  reader = await createPhotoReader()
})
afterAll(() => reader.close())

/** A hand does not hit a corner to the pixel: these are up to 20 pixels off. */
const SLIPS = [
  [20, -20],
  [-20, 20],
  [20, 20],
  [-20, 10],
] as const

test('a page placed by four corners set by hand is read as well as one the reader placed itself', async () => {
  const bytes = await readFile('samples/careful/careful.jpg')
  const [own] = await reader.read(bytes, 'careful.jpg')
  const h = own!.transform!.homography
  const inPhoto = (x_mm: number, y_mm: number) => {
    const w = h[6]! * x_mm + h[7]! * y_mm + h[8]!
    return { x: (h[0]! * x_mm + h[1]! * y_mm + h[2]!) / w, y: (h[3]! * x_mm + h[4]! * y_mm + h[5]!) / w }
  }
  const paper = [inPhoto(0, 0), inPhoto(210, 0), inPhoto(210, 297), inPhoto(0, 297)] as const
  const slipped = (i: 0 | 1 | 2 | 3) => ({ x: paper[i].x + SLIPS[i][0], y: paper[i].y + SLIPS[i][1] })
  const placed = await reader.readWithCorners(bytes, 'careful.jpg', {
    layout: 'tillage',
    version: 1,
    sheetCode: null,
    planned: true,
    corners: [slipped(0), slipped(1), slipped(2), slipped(3)],
  })
  expect(placed.takeAgain).toBeNull()
  for (const [key, { value }] of Object.entries(own!.readings)) expect([key, placed.readings[key]?.value]).toEqual([key, value])
})

import { expect, test } from 'vitest'
import type { Grey } from '../pixels/grey.ts'
import { isBlackAndWhite } from './black-and-white.ts'

/** White paper with black strokes and pale frames, averaged two by two as the reader measures it. */
function page(frame: number): Grey {
  const data = new Uint8Array(400 * 400).fill(250)
  for (let y = 0; y < 400; y++) {
    for (let x = 0; x < 400; x++) {
      if (x % 40 < 3) data[y * 400 + x] = frame
      // A stroke four dots wide has an edge of half the ink on each side.
      if (x % 40 > 15 && x % 40 < 20) data[y * 400 + x] = 24
      if (x % 40 === 15 && y % 2 === 0) data[y * 400 + x] = 194
    }
  }
  return { width: 400, height: 400, data }
}

test('a page whose pale frames went to white is black and white', () => expect(isBlackAndWhite(page(250))).toBe(true))
test('a page that still has its pale frames is not', () => expect(isBlackAndWhite(page(190))).toBe(false))

import { describe, expect, it } from 'vitest'
import type { Grey } from '../pixels/grey.ts'
import { isBlurred } from './blur.ts'

/** A bright page on a dark ground, 800 x 800; its sides go from dark to bright over `soft_px`. */
function page(soft_px: number, bright = 180): Grey {
  const ramp = (at: number) => Math.min(1, Math.max(0, (Math.min(at, 800 - at) - 200) / soft_px + 0.5))
  const data = new Uint8Array(800 * 800)
  for (let y = 0; y < 800; y++) for (let x = 0; x < 800; x++) data[y * 800 + x] = 30 + (bright - 30) * Math.min(ramp(x), ramp(y))
  return { width: 800, height: 800, data }
}

describe('a picture without codes', () => {
  it('is blurred when even the side of the page is', () => expect(isBlurred(page(24))).toBe(true))
  it('is not blurred when the side of the page is sharp', () => expect(isBlurred(page(1))).toBe(false))
  it('that shows nothing bright is not called blurred', () => expect(isBlurred(page(24, 50))).toBe(false))
})

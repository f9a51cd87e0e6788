import { expect, test } from 'vitest'
import { type Grey, halve } from './grey.ts'

/** Brightness that differs from pixel to pixel. */
function speckled(width: number, height: number): Grey {
  const data = new Uint8Array(width * height)
  for (let i = 0; i < data.length; i++) data[i] = (i * 151 + ((i / width) | 0) * 37) % 256
  return { width, height, data }
}

/** Widths that are and are not whole words of four bytes are halved in two ways. */
test.each([
  [16, 6],
  [18, 6],
  [17, 5],
])('every pixel of a %i x %i picture at half size is the mean of four, rounded', (width, height) => {
  const grey = speckled(width, height)
  const half = halve(grey)
  expect([half.width, half.height]).toEqual([width >> 1, height >> 1])
  for (let y = 0; y < half.height; y++) {
    for (let x = 0; x < half.width; x++) {
      const at = (u: number, v: number) => grey.data[(2 * y + v) * width + 2 * x + u]!
      const mean = (at(0, 0) + at(1, 0) + at(0, 1) + at(1, 1)) / 4
      expect(half.data[y * half.width + x]).toBe(Math.floor(mean + 0.5))
    }
  }
})

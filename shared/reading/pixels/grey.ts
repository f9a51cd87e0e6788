/** Grey pictures as plain buffers: one byte a pixel, row by row, 0 black to 255 white. Pixel (0, 0) covers [0, 1) x [0, 1). */
export interface Grey {
  width: number
  height: number
  data: Uint8Array
}

export interface Point {
  x: number
  y: number
}

/** Brightness at a place in pixels (0.5 is the middle of the first pixel), between the four nearest; outside: the edge's. */
export function brightnessAt({ width, height, data }: Grey, x: number, y: number): number {
  const px = Math.min(Math.max(x - 0.5, 0), width - 1.001)
  const py = Math.min(Math.max(y - 0.5, 0), height - 1.001)
  const x0 = px | 0
  const y0 = py | 0
  const fx = px - x0
  const at = y0 * width + x0
  const below = height > 1 ? at + width : at
  const top = data[at]! + (data[at + 1]! - data[at]!) * fx
  const bottom = data[below]! + (data[below + 1]! - data[below]!) * fx
  return top + (bottom - top) * (py - y0)
}

export const isInside = (grey: Grey, { x, y }: Point, margin_px = 0): boolean =>
  x >= margin_px && y >= margin_px && x <= grey.width - margin_px && y <= grey.height - margin_px

/** Half the size, each pixel the mean of four. An odd last row or column is left out. */
export function halve(grey: Grey): Grey {
  const width = grey.width >> 1
  const height = grey.height >> 1
  const data = new Uint8Array(width * height)
  if (grey.width % 4 === 0 && grey.data.byteOffset % 4 === 0) {
    halveWords(grey, width, height, data)
    return { width, height, data }
  }
  const from = grey.data
  for (let y = 0; y < height; y++) {
    let a = 2 * y * grey.width
    let b = a + grey.width
    const row = y * width
    for (let x = 0; x < width; x++, a += 2, b += 2) {
      data[row + x] = (from[a]! + from[a + 1]! + from[b]! + from[b + 1]! + 2) >> 2
    }
  }
  return { width, height, data }
}

const EVERY_OTHER = 0x00ff00ff
const ROUND_UP = 0x00020002

/** The same, four pixels of a row at a time: sums of two stand side by side in one number. */
function halveWords(grey: Grey, width: number, height: number, into: Uint8Array): void {
  const words = new Uint32Array(grey.data.buffer, grey.data.byteOffset, grey.data.length >> 2)
  const perRow = grey.width >> 2
  for (let y = 0; y < height; y++) {
    let at = y * width
    for (let i = 2 * y * perRow, end = i + perRow; i < end; i++, at += 2) {
      const a = words[i]!
      const b = words[i + perRow]!
      const sums = (a & EVERY_OTHER) + ((a >>> 8) & EVERY_OTHER) + (b & EVERY_OTHER) + ((b >>> 8) & EVERY_OTHER) + ROUND_UP
      into[at] = sums >>> 2
      into[at + 1] = sums >>> 18
    }
  }
}

/** A rectangle copied out, clipped to the picture; `x`, `y` are where it really starts. Null when nothing is left. */
export function crop(
  grey: Grey,
  left: number,
  top: number,
  right: number,
  bottom: number,
): { grey: Grey; x: number; y: number } | null {
  const x = Math.max(0, Math.floor(left))
  const y = Math.max(0, Math.floor(top))
  const width = Math.min(grey.width, Math.ceil(right)) - x
  const height = Math.min(grey.height, Math.ceil(bottom)) - y
  if (width < 8 || height < 8) return null
  const data = new Uint8Array(width * height)
  for (let row = 0; row < height; row++) {
    const start = (y + row) * grey.width + x
    data.set(grey.data.subarray(start, start + width), row * width)
  }
  return { grey: { width, height, data }, x, y }
}

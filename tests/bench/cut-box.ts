/** Cuts one box out of a photo, upright and without its frame, for a reader that wants a small picture. */
import sharp from 'sharp'

export type Corners = ReadonlyArray<readonly [number, number]>

const WIDTH = 56
const HEIGHT = 72
const MARGIN = 24

/** PNG of the inside of the box (7 % trimmed on each side) on white. Corners clockwise from the top left, in pixels. */
export async function cutBox(picture: { data: Uint8Array; width: number; height: number }, corners: Corners): Promise<Buffer> {
  const out = new Uint8Array((WIDTH + 2 * MARGIN) * (HEIGHT + 2 * MARGIN)).fill(255)
  const [a, b, c, d] = corners as [Corners[0], Corners[0], Corners[0], Corners[0]]
  const values: number[] = []
  for (let y = 0; y < HEIGHT; y += 1) {
    for (let x = 0; x < WIDTH; x += 1) {
      const u = 0.07 + (0.86 * (x + 0.5)) / WIDTH
      const v = 0.07 + (0.86 * (y + 0.5)) / HEIGHT
      const at = (k: 0 | 1) => (1 - v) * ((1 - u) * a![k] + u * b![k]) + v * ((1 - u) * d![k] + u * c![k])
      const [px, py] = [Math.round(at(0)), Math.round(at(1))]
      const inside = px >= 0 && py >= 0 && px < picture.width && py < picture.height
      values.push(inside ? picture.data[py * picture.width + px]! : 255)
    }
  }
  const paper = [...values].sort((p, q) => p - q)[Math.floor(values.length * 0.9)]!
  values.forEach((value, i) => {
    const row = MARGIN + Math.floor(i / WIDTH)
    out[row * (WIDTH + 2 * MARGIN) + MARGIN + (i % WIDTH)] = Math.min(255, (255 * value) / Math.max(1, paper))
  })
  return sharp(out, { raw: { width: WIDTH + 2 * MARGIN, height: HEIGHT + 2 * MARGIN, channels: 1 } })
    .png()
    .toBuffer()
}

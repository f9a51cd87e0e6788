/** How bright the bare paper is at each place, so that darkness means the same in light and in shadow. */
import { brightnessAt, type Grey } from './grey.ts'

export interface PaperLevel {
  /** Side of a block in pixels of the picture it was made from. */
  block_px: number
  level: Grey
}

/** The share of a block's pixels that are darker than its paper level: writing and print rarely cover more of it. */
const PAPER_SHARE = 0.78
/** A block under this share of its neighbours' level holds no paper (a solid mark) and takes theirs. */
const NO_PAPER = 0.72

function blockLevels(grey: Grey, block_px: number): Grey {
  const width = Math.max(2, Math.ceil(grey.width / block_px))
  const height = Math.max(2, Math.ceil(grey.height / block_px))
  const data = new Uint8Array(width * height)
  const counts = new Uint16Array(64)
  const step = block_px > 10 ? 2 : 1
  for (let by = 0; by < height; by++) {
    for (let bx = 0; bx < width; bx++) {
      counts.fill(0)
      let seen = 0
      const bottom = Math.min((by + 1) * block_px, grey.height)
      const right = Math.min((bx + 1) * block_px, grey.width)
      for (let y = by * block_px; y < bottom; y += step) {
        for (let at = y * grey.width + bx * block_px, end = y * grey.width + right; at < end; at += step) {
          counts[grey.data[at]! >> 2]!++
          seen++
        }
      }
      let left = seen * (1 - PAPER_SHARE)
      let bin = 63
      while (bin > 0 && left > counts[bin]!) left -= counts[bin--]!
      data[by * width + bx] = bin * 4 + 2
    }
  }
  return { width, height, data }
}

/** Replaces blocks without paper by the median of their neighbours. */
function fillSolid(level: Grey): Grey {
  const out = Uint8Array.from(level.data)
  const around: number[] = []
  const { width, height, data } = level
  const brightest = (x: number, y: number) => {
    const [left, right] = [Math.max(0, x - 2), Math.min(width - 1, x + 2)]
    const [above, below] = [Math.max(0, y - 2) * width, Math.min(height - 1, y + 2) * width]
    const row = y * width
    return Math.max(
      data[row + left]!,
      data[row + right]!,
      data[above + x]!,
      data[below + x]!,
      data[above + left]!,
      data[below + right]!,
    )
  }
  for (let y = 0; y < height; y++) {
    for (let x = 0; x < width; x++) {
      if (data[y * width + x]! >= NO_PAPER * brightest(x, y)) continue
      around.length = 0
      for (let v = Math.max(0, y - 2); v <= Math.min(level.height - 1, y + 2); v++) {
        for (let u = Math.max(0, x - 2); u <= Math.min(level.width - 1, x + 2); u++) around.push(level.data[v * level.width + u]!)
      }
      around.sort((a, b) => a - b)
      const upper = around[(around.length * 0.6) | 0]!
      const at = y * level.width + x
      if (level.data[at]! < NO_PAPER * upper) out[at] = upper
    }
  }
  return { ...level, data: out }
}

/** Estimates the paper in blocks of about `block_px` pixels (about 2 mm of paper is right). */
export function paperLevel(grey: Grey, block_px: number): PaperLevel {
  const block = Math.max(4, Math.round(block_px))
  return { block_px: block, level: fillSolid(blockLevels(grey, block)) }
}

/** Brightness of bare paper at a place in pixels of the picture. */
export const paperAt = (paper: PaperLevel, x: number, y: number): number =>
  Math.max(12, brightnessAt(paper.level, x / paper.block_px, y / paper.block_px))

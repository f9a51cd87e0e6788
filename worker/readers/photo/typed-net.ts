/** The digit net's word on typed digits: a second reader that has nothing in common with the text engine. */
import { CELL_HEIGHT_PX, CELL_PX, CELL_WIDTH_PX, CLASS_COUNT, type DigitNet } from '../../../shared/reading/classes.ts'
import type { Glyph } from './typed-glyphs.ts'
import type { Word } from './typed-line.ts'
import type { Strip } from './typed-strip.ts'

/** The net knows digits of hands: this high, in pixels of its cell, within the grey frame of a box. */
const DIGIT_PX = 23
const FRAME = 0.3
const FRAME_INSET_PX = 2

/** For each word the probabilities of 0 to 9 of each of its digits. */
export async function netOnWords(net: DigitNet, words: readonly Word[]): Promise<number[][][]> {
  const all = words.flatMap(({ strip, digits }) => digits.map((glyph) => ({ strip, glyph })))
  const cells = new Float32Array(all.length * CELL_PX)
  all.forEach(({ strip, glyph }, i) => {
    drawCell(strip, glyph, cells.subarray(i * CELL_PX, (i + 1) * CELL_PX))
  })
  const p = await net.classify(cells, all.length)
  let next = 0
  return words.map(({ digits }) =>
    digits.map(() => {
      const at = next++ * CLASS_COUNT
      const ten = Array.from(p.subarray(at, at + 10))
      const sum = ten.reduce((a, b) => a + b, 1e-9)
      return ten.map((v) => v / sum)
    }),
  )
}

function drawCell(strip: Strip, glyph: Glyph, cell: Float32Array): void {
  const frameRight = CELL_WIDTH_PX - 1 - FRAME_INSET_PX
  const frameLow = CELL_HEIGHT_PX - 1 - FRAME_INSET_PX
  const scale = (glyph.low - glyph.top) / DIGIT_PX
  const [midX, midY] = [(glyph.left + glyph.right) / 2, (glyph.top + glyph.low) / 2]
  for (let y = 0; y < CELL_HEIGHT_PX; y++) {
    for (let x = 0; x < CELL_WIDTH_PX; x++) {
      const onFrame = x === FRAME_INSET_PX || x === frameRight || y === FRAME_INSET_PX || y === frameLow
      const ink = meanOf(strip, glyph, midX + (x - CELL_WIDTH_PX / 2) * scale, midY + (y - CELL_HEIGHT_PX / 2) * scale, scale)
      cell[y * CELL_WIDTH_PX + x] = Math.max(onFrame ? FRAME : 0, ink)
    }
  }
}

/** Mean darkness of a square of the strip, as far as it belongs to the glyph. */
function meanOf(strip: Strip, glyph: Glyph, left: number, top: number, side: number): number {
  let sum = 0
  let dots = 0
  for (let v = Math.floor(top); v < top + side; v++) {
    for (let u = Math.floor(left); u < left + side; u++) {
      dots++
      if (u < glyph.left - 1 || u > glyph.right || v < glyph.top - 1 || v > glyph.low || u >= strip.width || v >= strip.height)
        continue
      sum += Math.min(1, strip.darkness[v * strip.width + u]! / strip.ink)
    }
  }
  return sum / dots
}

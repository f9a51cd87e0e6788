/** The written page as the camera meets it: print, ink, paper colour and dirt, at one dot size or a coarser one. */
import type { InkLayer } from './ink.ts'
import type { Print } from './page-render.ts'
import type { Stain } from './stains.ts'
import type { Writer } from './writer.ts'

export interface Paper {
  width: number
  height: number
  dotsPerMm: number
  print: Uint8Array
  cover: Uint8Array
  /** What is left of red, green and blue at full cover, 0 to 1. */
  ink: readonly [number, number, number]
  /** White of the paper, 0 to 255. */
  white: readonly [number, number, number]
  stain: Stain | null
  /** A corner that is not there: dots with p * u + q * v + r < 0 are left out. */
  lost: readonly [number, number, number] | null
}

function halve(source: Uint8Array, width: number, height: number): Uint8Array {
  const [w, h] = [width >> 1, height >> 1]
  const out = new Uint8Array(w * h)
  for (let y = 0; y < h; y += 1) {
    for (let x = 0; x < w; x += 1) {
      const i = 2 * y * width + 2 * x
      out[y * w + x] = (source[i]! + source[i + 1]! + source[i + width]! + source[i + width + 1]! + 2) >> 2
    }
  }
  return out
}

/**
 * Joins print and ink. `toner` 1 prints full black, less is faint.
 * @param coarse true where the picture has under 8 pixels a millimetre: the page is averaged to 150 dots an inch first
 */
export function joinPaper(
  print: Print,
  ink: InkLayer,
  writer: Writer,
  white: Paper['white'],
  toner: number,
  coarse: boolean,
): Paper {
  const [r, g, b] = writer.colour
  const faint = Uint8Array.from({ length: 256 }, (_, v) => Math.round(255 - (255 - v) * toner))
  const grey = print.grey.map((v) => faint[v]!)
  const base = { ink: [r / 255, g / 255, b / 255] as const, white, stain: null, lost: null }
  if (!coarse) return { ...base, width: print.width, height: print.height, dotsPerMm: 300 / 25.4, print: grey, cover: ink.cover }
  return {
    ...base,
    width: print.width >> 1,
    height: print.height >> 1,
    dotsPerMm: 150 / 25.4,
    print: halve(grey, print.width, print.height),
    cover: halve(ink.cover, ink.width, ink.height),
  }
}

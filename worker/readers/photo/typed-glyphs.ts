/** What stands in a strip, piece by piece from left to right: digits, and the small marks between them. */
import type { Strip } from './typed-strip.ts'

/** A share of the ink's darkness: thin strokes of a serif face fall far below the thick ones. */
const EDGE = 0.38
/** Less than this is a speck, mm². */
const SPECK_MM2 = 0.09
/** Pieces that stand over each other by this share of the narrower one are one glyph. */
const SAME_COLUMN = 0.5
/** A point, colon or hyphen is lower than this, mm; digits are higher. */
const MARK_MM = 1.2

/** A rectangle in pixels of the strip, right and low exclusive. */
export interface Glyph {
  left: number
  right: number
  top: number
  low: number
}

export interface Glyphs {
  digits: Glyph[]
  /** Points, colons, hyphens. */
  marks: Glyph[]
}

export function glyphsOf(strip: Strip): Glyphs {
  if (strip.ink === 0) return { digits: [], marks: [] }
  const all = joinColumns(pieces(strip))
  const isDigit = (g: Glyph) => g.low - g.top > MARK_MM * strip.px_per_mm
  return { digits: all.filter(isDigit), marks: all.filter((g) => !isDigit(g)) }
}

/** Connected pieces of ink, specks left out. */
function pieces({ width, height, px_per_mm, darkness, ink }: Strip): Glyph[] {
  const level = EDGE * ink
  const seen = new Uint8Array(width * height)
  const out: Glyph[] = []
  const stack: number[] = []
  for (let start = 0; start < seen.length; start++) {
    if (seen[start] || darkness[start]! < level) continue
    const piece = { left: width, right: 0, top: height, low: 0 }
    let dots = 0
    seen[start] = 1
    stack.push(start)
    while (stack.length > 0) {
      const at = stack.pop()!
      const x = at % width
      const y = (at / width) | 0
      dots++
      piece.left = Math.min(piece.left, x)
      piece.right = Math.max(piece.right, x + 1)
      piece.top = Math.min(piece.top, y)
      piece.low = Math.max(piece.low, y + 1)
      for (let v = Math.max(0, y - 1); v <= Math.min(height - 1, y + 1); v++) {
        for (let u = Math.max(0, x - 1); u <= Math.min(width - 1, x + 1); u++) {
          const next = v * width + u
          if (seen[next] || darkness[next]! < level) continue
          seen[next] = 1
          stack.push(next)
        }
      }
    }
    if (dots >= SPECK_MM2 * px_per_mm * px_per_mm) out.push(piece)
  }
  return out
}

function joinColumns(found: Glyph[]): Glyph[] {
  const out: Glyph[] = []
  for (const piece of found.sort((a, b) => a.left - b.left)) {
    const last = out.at(-1)
    const shared = last ? Math.min(last.right, piece.right) - piece.left : 0
    if (last && shared >= SAME_COLUMN * Math.min(last.right - last.left, piece.right - piece.left)) {
      last.right = Math.max(last.right, piece.right)
      last.top = Math.min(last.top, piece.top)
      last.low = Math.max(last.low, piece.low)
    } else out.push({ ...piece })
  }
  return out
}

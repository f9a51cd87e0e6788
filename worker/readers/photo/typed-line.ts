/** Typed digits set anew, close together and without frames, many combs to a picture: the way the text engine reads best. */
import type { SeenSymbol, TextEngine, TextPicture } from './text-engine.ts'
import type { Glyph } from './typed-glyphs.ts'
import type { Strip } from './typed-strip.ts'

/** One comb's digits, cut out of its strip. */
export interface Word {
  strip: Strip
  digits: readonly Glyph[]
}

export interface TypedDigit {
  digit: number
  /** 0 to 100. */
  confidence: number
}

/** In heights of a digit: between digits, between words, between lines, around all. */
const LETTER_GAP = 0.22
const WORD_GAP = 1.6
const LINE_PITCH = 2.2
const LINE_HEIGHTS = 34
const LINES = 6

interface Placed {
  word: number
  line: number
  from: number
  to: number
}

/**
 * The digits of each word by the text engine; null where it saw another number of them than there are.
 * @param height_px of a digit, alike in all strips
 * @param most_ms after which no further picture is handed to the engine
 */
export async function readWords(
  engine: TextEngine,
  words: readonly Word[],
  height_px: number,
  most_ms: number,
): Promise<Array<TypedDigit[] | null>> {
  const out: Array<TypedDigit[] | null> = words.map(() => null)
  const places = placeWords(words, height_px)
  const lines = (places.at(-1)?.line ?? -1) + 1
  const until = performance.now() + most_ms
  for (let first = 0; first < lines && performance.now() < until; first += LINES) {
    const own = places.filter((p) => p.line >= first && p.line < first + LINES)
    const symbols = await engine.symbols(draw(words, own, first, height_px), '0123456789')
    for (const place of own) {
      const seen = symbols.filter((s) => isWithin(s, place, first, height_px)).sort((a, b) => a.x - b.x)
      if (seen.length !== words[place.word]!.digits.length) continue
      out[place.word] = seen.map(({ text, confidence }) => ({ digit: Number(text), confidence }))
    }
  }
  return out
}

const widthOf = ({ digits }: Word, height_px: number) =>
  digits.reduce((sum, g) => sum + g.right - g.left, 0) + (digits.length - 1) * LETTER_GAP * height_px

function placeWords(words: readonly Word[], height_px: number): Placed[] {
  let line = 0
  let x = WORD_GAP * height_px
  return words.map((word, i) => {
    const width = widthOf(word, height_px)
    if (x + width > LINE_HEIGHTS * height_px) {
      line++
      x = WORD_GAP * height_px
    }
    const place = { word: i, line, from: x, to: x + width }
    x += width + WORD_GAP * height_px
    return place
  })
}

const isWithin = ({ x, y }: SeenSymbol, place: Placed, first: number, height_px: number) =>
  Math.floor(y / (LINE_PITCH * height_px)) === place.line - first &&
  x > place.from - (WORD_GAP * height_px) / 2 &&
  x < place.to + (WORD_GAP * height_px) / 2

function draw(words: readonly Word[], places: readonly Placed[], first: number, height_px: number): TextPicture {
  const width = Math.ceil((LINE_HEIGHTS + 2 * WORD_GAP) * height_px)
  const lines = places.at(-1)!.line - first + 1
  const height = Math.ceil(lines * LINE_PITCH * height_px)
  const data = new Uint8Array(width * height).fill(255)
  for (const { word, line, from } of places) {
    const { strip, digits } = words[word]!
    let x = Math.round(from)
    // All digits of a word stand on the line as they stood in their comb.
    const low = Math.max(...digits.map((g) => g.low))
    const base = Math.round((line - first + 0.5) * LINE_PITCH * height_px + height_px / 2)
    for (const glyph of digits) {
      copy(strip, glyph, data, width, x, base - (low - glyph.low))
      x += glyph.right - glyph.left + Math.round(LETTER_GAP * height_px)
    }
  }
  return { width, height, data, px_per_mm: words[0]!.strip.px_per_mm }
}

/** With the soft rim that lies outside of the glyph's outline. */
const RIM = 2

function copy(strip: Strip, glyph: Glyph, data: Uint8Array, width: number, x: number, base: number): void {
  for (let v = glyph.top - RIM; v < glyph.low + RIM; v++) {
    for (let u = glyph.left - RIM; u < glyph.right + RIM; u++) {
      if (u < 0 || v < 0 || u >= strip.width || v >= strip.height) continue
      const dark = Math.min(1, strip.darkness[v * strip.width + u]! / strip.ink)
      const at = (base - glyph.low + v) * width + x + u - glyph.left
      data[at] = Math.min(data[at]!, Math.round(255 * (1 - dark)))
    }
  }
}

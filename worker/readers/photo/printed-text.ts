/** Printed and typed text by tesseract.js: the block of planned facts and the sheet's code in letters. Never hand-writing. */
import type { AreaCell, Layout } from '../../../shared/layouts/layout.ts'
import { type PageMap, toPhoto } from '../../../shared/reading/geometry/page-map.ts'
import { brightnessAt, type Grey } from '../../../shared/reading/pixels/grey.ts'
import { codeFromText } from './printed-code.ts'
import type { TextEngine, TextPicture } from './text-engine.ts'

/** Type of 7 points needs this to be read without mistakes. */
const PX_PER_MM = 14

/** Type covers at least this share of its line, and is at least this dark beside the paper. */
const INK_SHARE = 0.01
const INK_LEVEL = 0.62
const PLAN_CHARACTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789-.,:/() '

/** The code alone: thirteen letters of one width, without the word before them. */
const CODE_MM = 37.2
const CODE_CHARACTERS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ-'

/** Kept off the printed line, mm. */
const ABOVE_LINE_MM = 0.7
/** From 0 to 100: type is mostly above 90, hands below 60. */
const SURE = 85
const WORD_CHARACTERS = `${PLAN_CHARACTERS}'"+=%&?`

interface Area {
  x: number
  y: number
  width: number
  height: number
}

export interface PrintedText {
  /** Lines of the typed block, down its columns, as they were read. */
  planLines(grey: Grey, map: PageMap, layout: Layout): Promise<string[]>
  /** The sheet's code as printed in the head, or null when its check character does not agree. */
  sheetCode(grey: Grey, map: PageMap, layout: Layout): Promise<string | null>
  /** The words typed on a line, with the chance that they are right; null where the engine is not sure of every one. */
  typedLine(grey: Grey, map: PageMap, line: AreaCell): Promise<{ text: string; p: number } | null>
}

export function createPrintedText(engine: TextEngine): PrintedText {
  return {
    async planLines(grey, map, layout) {
      const { x, y, columnWidth, columns, rows, rowHeight } = layout.planBlock
      const lines: string[] = []
      for (let column = 0; column < columns; column++) {
        const left = x + column * columnWidth - 1
        const filled = Array.from({ length: rows }, (_, row) => row).filter((row) =>
          hasInk(cutFlat(grey, map, { x: left, y: y + row * rowHeight - 0.9, width: columnWidth, height: rowHeight })),
        )
        if (filled.length === 0) continue
        const height = (filled.at(-1)! + 1) * rowHeight + 0.8
        const piece = cutFlat(grey, map, { x: left, y: y - 1.2, width: columnWidth, height })
        const text = await engine.text(piece, PLAN_CHARACTERS)
        lines.push(
          ...text
            .split('\n')
            .map((line) => line.trim())
            .filter((line) => line !== ''),
        )
      }
      return lines
    },
    async sheetCode(grey, map, layout) {
      const { x, y } = layout.codeText
      const piece = cutFlat(grey, map, { x: x - CODE_MM, y: y - 6.6, width: CODE_MM + 1, height: 6.4 })
      return hasInk(piece) ? codeFromText(await engine.text(piece, CODE_CHARACTERS)) : null
    },
    async typedLine(grey, map, { x, y, width, height }) {
      const piece = cutFlat(grey, map, { x, y, width, height: height - ABOVE_LINE_MM })
      if (!hasInk(piece) || runsOut(piece)) return null
      const { text, confidence } = await engine.line(piece, WORD_CHARACTERS)
      return confidence >= SURE && text.length > 1 ? { text, p: confidence / 100 } : null
    },
  }
}

/** A piece of the page as it would lie flat. */
function cutFlat(grey: Grey, map: PageMap, area: Area): TextPicture {
  const width = Math.round(area.width * PX_PER_MM)
  const height = Math.round(area.height * PX_PER_MM)
  const data = new Uint8Array(width * height)
  for (let row = 0; row < height; row++) {
    for (let column = 0; column < width; column++) {
      const to = toPhoto(map, area.x + (column + 0.5) / PX_PER_MM, area.y + (row + 0.5) / PX_PER_MM)
      data[row * width + column] = brightnessAt(grey, to.x, to.y)
    }
  }
  return { width, height, data, px_per_mm: PX_PER_MM }
}

/** The engine reads letters into grain, so it is never shown bare paper. */
function hasInk({ data }: TextPicture): boolean {
  const sorted = Uint8Array.from(data).sort()
  const paper = sorted[Math.floor(sorted.length * 0.7)]!
  return sorted[Math.floor(sorted.length * INK_SHARE)]! < paper * INK_LEVEL
}

/** Words that go on beyond the piece: what is seen of them is not what was typed. */
function runsOut({ width, height, data, px_per_mm }: TextPicture): boolean {
  const paper = Uint8Array.from(data).sort()[Math.floor(data.length * 0.7)]!
  for (let y = 0; y < height; y++) {
    for (let x = width - Math.round(px_per_mm); x < width; x++) if (data[y * width + x]! < paper * INK_LEVEL) return true
  }
  return false
}

/** The values of a sheet typed on a computer: a page with nothing but the type, to be laid over the printed sheet. */
import { createRequire } from 'node:module'
import PDFDocument from 'pdfkit'
import { finish, mm } from '../../../server/print/page.ts'
import { type Box, boxesOf, layComb } from '../../../shared/layouts/geometry.ts'
import { BOX, type CombCell, isComb, type Layout } from '../../../shared/layouts/layout.ts'
import { boxDigits } from '../boxes.ts'
import type { Scenario, Written } from '../scenario.ts'

const require = createRequire(import.meta.url)
const embedded = (family: 'next' | 'mono') =>
  require.resolve(`@fontsource/atkinson-hyperlegible-${family}/files/atkinson-hyperlegible-${family}-latin-400-normal.woff`)

/** Two faces embedded from files, three that every PDF program brings along. */
export const FACES = {
  grotesque: 'Helvetica',
  roman: 'Times-Roman',
  typewriter: 'Courier-Bold',
  plain: embedded('next'),
  'slashed zeros': embedded('mono'),
} as const
export type FaceName = keyof typeof FACES

export interface Typing {
  face: FaceName
  /** Points: boxes are 20 points high. */
  size_pt: number
  /** boxed: a digit in the middle of each box, as form fields do. run: the value as a word across the comb, with its point. */
  way: 'boxed' | 'run'
  /** How far the type stands from the middle of the boxes, mm: forms are never set quite right. */
  off: readonly [number, number]
}

const LINE_PT = 10

/** One page that holds the type alone. */
export function typePage(layout: Layout, scenario: Scenario, typing: Typing): Promise<Buffer> {
  const { width, height } = layout.page
  const pdf = new PDFDocument({ size: [mm(width), mm(height)], margin: 0, info: { CreationDate: new Date(0) } })
  pdf.font(FACES[typing.face]).fontSize(typing.size_pt).fillColor('#000000')
  const put = (text: string, box: Box) => {
    const left = mm(box.x + box.width / 2 + typing.off[0]) - pdf.widthOfString(text) / 2
    pdf.text(text, left, mm(box.y + box.height / 2 + typing.off[1]) + 0.35 * typing.size_pt, {
      lineBreak: false,
      baseline: 'alphabetic',
    })
  }
  for (const cell of layout.cells) {
    const value = scenario.readings[cell.key]
    if (value === undefined || value === null) continue
    if (isComb(cell)) typeComb(cell, value, scenario, typing, put)
    else if (cell.kind === 'tick' && value === true) put('X', boxesOf(cell)[0]!)
    else if (cell.kind === 'choice') put('X', boxesOf(cell).find((b) => b.option === value)!)
    else if (cell.kind === 'line' && typeof value === 'string') typeLine(pdf, value, boxesOf(cell)[0]!, typing.size_pt)
  }
  return finish(pdf)
}

function typeComb(
  cell: CombCell,
  value: Written,
  scenario: Scenario,
  typing: Typing,
  put: (text: string, box: Box) => void,
): void {
  const unit = cell.scale && scenario.readings[cell.scale.by]
  const digits = boxDigits(cell, value, (typeof unit === 'string' && cell.scale?.factors[unit]) || 1, cell.register !== undefined)
  if (typing.way === 'boxed') {
    const boxes = boxesOf(cell)
    digits.forEach((digit, i) => {
      if (digit !== null) put(String(digit), boxes[i]!)
    })
    return
  }
  let next = 0
  const word = [...cell.format].map((mark) => (mark === '9' ? (digits[next++] ?? '') : mark)).join('')
  put(word, { x: cell.x, y: cell.y, width: layComb(cell).width, height: BOX.height })
}

/** Words are smaller than digits and begin at the line's left end. */
function typeLine(pdf: PDFKit.PDFDocument, text: string, box: Box, size_pt: number): void {
  pdf.fontSize(LINE_PT).text(text, mm(box.x + 1), mm(box.y + box.height - 1.2), { lineBreak: false, baseline: 'alphabetic' })
  pdf.fontSize(size_pt)
}

/** What the reader looks for on the paper: corner codes, squares, combs and tick boxes. */
import { cornerModules } from '../../shared/layouts/corner-modules.ts'
import { layComb } from '../../shared/layouts/geometry.ts'
import { BOX, type CombCell, type Layout, TICK } from '../../shared/layouts/layout.ts'
import { FRAME, mm } from './page.ts'

type Pdf = PDFKit.PDFDocument
const MARK = '#000000'
const BAR = '#4d4d4d'

export function drawCodes(pdf: Pdf, layout: Layout, sheetCode: string, planned: boolean): void {
  layout.codes.forEach((place, corner) => {
    const modules = cornerModules({ layoutCode: layout.code, version: layout.version, corner, planned, sheetCode })
    const step = place.size / modules.length
    modules.forEach((row, r) => {
      row.forEach((dark, c) => {
        if (dark) pdf.rect(mm(place.x + c * step), mm(place.y + r * step), mm(step), mm(step))
      })
    })
    pdf.fill(MARK)
  })
  for (const square of layout.squares) pdf.rect(mm(square.x), mm(square.y), mm(square.size), mm(square.size)).fill(MARK)
}

/** A wedge and a taller bar open a comb and a bar closes it, so that one set a box off cannot match. */
export function drawComb(pdf: Pdf, cell: CombCell): void {
  const { boxes, separators, width } = layComb(cell)
  for (const box of boxes) {
    pdf.lineWidth(mm(BOX.frame)).rect(mm(box.x), mm(box.y), mm(box.width), mm(box.height)).stroke(FRAME)
  }
  const { x, y } = cell
  pdf.rect(mm(x - BOX.bar), mm(y - BOX.barRise), mm(BOX.bar), mm(BOX.height + 2 * BOX.barRise)).fill(BAR)
  pdf.rect(mm(x + width), mm(y), mm(BOX.bar), mm(BOX.height)).fill(BAR)
  const middle = y + BOX.height / 2
  pdf
    .moveTo(mm(x - 2.1), mm(middle - 1.1))
    .lineTo(mm(x - 0.9), mm(middle))
    .lineTo(mm(x - 2.1), mm(middle + 1.1))
    .fill(BAR)
  for (const s of separators) drawSeparator(pdf, s.mark, s.x, s.y)
}

function drawSeparator(pdf: Pdf, mark: string, x: number, y: number): void {
  const dot = (height: number) => pdf.circle(mm(x), mm(y + height), mm(0.5)).fill(BAR)
  if (mark === '.') dot(BOX.height - 0.7)
  else if (mark === ':') {
    dot(2.2)
    dot(BOX.height - 2.2)
  } else pdf.rect(mm(x - 0.55), mm(y + BOX.height / 2 - 0.2), mm(1.1), mm(0.4)).fill(BAR)
}

/** A tick box with a heavy upper left corner, which the reader finds and digits never have. */
export function drawTick(pdf: Pdf, x: number, y: number): void {
  pdf.lineWidth(mm(BOX.frame)).rect(mm(x), mm(y), mm(TICK.size), mm(TICK.size)).stroke('#8c8c8c')
  pdf
    .rect(mm(x - 0.3), mm(y - 0.3), mm(1.7), mm(0.6))
    .rect(mm(x - 0.3), mm(y - 0.3), mm(0.6), mm(1.7))
    .fill(BAR)
}

/** The figure as a knot on its band, on a measuring tape. */
import { GREY, INK, mm, textAt } from './page.ts'

/** The band, and its ground. */
export const STRAW = '#e6bf47'
export const STRAW_PALE = '#f5e8b6'

interface Tape {
  value: number
  U: number | null
  unit: string
  /** Where the tape begins and ends on the page, and the height of its line, mm. */
  left: number
  right: number
  y: number
}

/** Figures along the tape. */
const MAJORS = 6

export function drawTape(pdf: PDFKit.PDFDocument, { value, U, unit, left, right, y }: Tape): void {
  const step = niceStep(Math.max(4 * (U ?? 0), Math.abs(value) * 0.4) / MAJORS)
  const from = Math.max(0, Math.floor(value / step - MAJORS / 2) * step)
  const at = (figure: number) => left + 4 + ((figure - from) / (MAJORS * step)) * (right - left - 8)
  if (U !== null) {
    const band = [Math.max(from, value - U), Math.min(from + MAJORS * step, value + U)] as const
    pdf
      .rect(mm(at(band[0])), mm(y - 9), mm(at(band[1]) - at(band[0])), mm(7))
      .lineWidth(mm(0.4))
      .fillAndStroke(STRAW, INK)
  }
  const [x, middle] = [at(value), y - 5.5]
  pdf
    .moveTo(mm(x - 3), mm(middle - 3))
    .lineTo(mm(x + 3), mm(middle + 3))
    .lineTo(mm(x + 3), mm(middle - 3))
  pdf
    .lineTo(mm(x - 3), mm(middle + 3))
    .closePath()
    .fill(INK)
  pdf.lineWidth(mm(0.5)).moveTo(mm(left), mm(y)).lineTo(mm(right), mm(y)).stroke(INK)
  for (let tenth = 0; tenth <= MAJORS * 10; tenth += 1) {
    const major = tenth % 10 === 0
    const figure = from + (tenth * step) / 10
    pdf
      .lineWidth(mm(major ? 0.5 : 0.2))
      .moveTo(mm(at(figure)), mm(y))
      .lineTo(mm(at(figure)), mm(y + (major ? 2.6 : 1.5)))
      .stroke(INK)
    if (major)
      textAt(pdf, String(Number(figure.toPrecision(8))), at(figure), y + 6.6, { size: 9.5, face: 'mono', align: 'center' })
  }
  textAt(pdf, unit, right, y - 3, { size: 9.5, color: GREY, align: 'right' })
}

function niceStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least))
  return power * ([1, 2, 5].find((s) => s * power >= least) ?? 10)
}

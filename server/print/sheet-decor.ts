/** What people look for on the paper: the mark, the digits to imitate, the pegs of the plot. */
import type { Layout } from '../../shared/layouts/layout.ts'
import { GREY, INK, mm, textAt } from './page.ts'

type Pdf = PDFKit.PDFDocument

/** Digits as one pen would write them, in a 10 x 14 box; drawn by us, not taken from a face. */
const STROKES: Record<string, string> = {
  '0': 'M5 0.8 C2 0.8 1 4 1 7 C1 10.5 2.4 13.2 5 13.2 C7.8 13.2 9 10.4 9 7 C9 3.8 7.8 0.8 5 0.8 Z',
  '1': 'M5.2 0.8 L5 13.2',
  '2': 'M1.4 3.6 C2 1.6 3.4 0.8 5.2 0.8 C7.6 0.8 8.8 2.4 8.6 4.4 C8.3 7.4 4 9.6 1.2 13 L9 12.9',
  '3': 'M1.6 2 C3.2 0.6 8.4 0.2 8.4 3.6 C8.4 6 6 6.7 4.2 6.7 C6.6 6.7 9 7.6 8.8 10 C8.5 13.8 3 13.8 1.2 11.8',
  '4': 'M3.4 0.9 L1.2 8.6 L9 8.4 M6.8 3.4 L6.5 13.3',
  '5': 'M8.4 1 L2.6 1.2 L2 6.2 C4.4 5 8.8 5.6 8.7 9.2 C8.6 13.4 3.6 14 1.3 12',
  '6': 'M7.4 0.9 C4 2.2 1.2 6 1.2 9.4 C1.2 12 2.8 13.3 4.9 13.3 C7.2 13.3 8.8 11.6 8.7 9.5 C8.5 6.2 3 6 1.4 9.2',
  '7': 'M1.2 1.1 L8.9 1 C7 5 5 9 4 13.3',
  '8': 'M8 2.6 C7 0.4 2.2 0.2 2 3.3 C1.8 6 8.8 7.4 8.8 10.4 C8.8 14 1.4 14.2 1.4 10.4 C1.4 7.4 8.2 6 8 2.6 Z',
  '9': 'M8.6 4.4 C8.4 2.2 7 0.8 5 0.8 C2.8 0.8 1.3 2.4 1.4 4.4 C1.6 7.6 7 7.6 8.6 4.4 C8.6 8 7.6 11 6.2 13.3',
}

const PEN = '#333333'

export function drawWriting(pdf: Pdf, layout: Layout): void {
  if (!layout.writing) return
  const { x, y, height } = layout.writing
  textAt(pdf, 'Write', x, y + 4.4, { size: 8.2, face: 'bold' })
  textAt(pdf, 'like this', x, y + 7.6, { size: 6.6, color: GREY })
  const scale = 0.44
  '0123456789'.split('').forEach((digit, i) => {
    pdf
      .save()
      .translate(mm(x + 13 + i * 5.3), mm(y + (height - 14 * scale) / 2))
      .scale(mm(scale))
    pdf.path(STROKES[digit]!).lineWidth(1).lineCap('round').lineJoin('round').stroke(PEN).restore()
  })
  const words = x + 68.5
  textAt(pdf, 'One digit a box, large, clear of the frame.', words, y + 2.8, { size: 6.6 })
  textAt(pdf, 'Start at the right. Not measured: leave it empty.', words, y + 5.8, { size: 6.6 })
  textAt(pdf, 'Wrong? One line through, new value beside it.', words, y + 8.8, { size: 6.6 })
}

export function drawFigure(pdf: Pdf, layout: Layout): void {
  if (!layout.figure) return
  const { x, y, width, height } = layout.figure
  const pegs = { A: [0.14, 0.9], B: [0.84, 0.84], C: [0.9, 0.12], D: [0.18, 0.06] } as const
  const at = (peg: keyof typeof pegs): [number, number] => [mm(x + pegs[peg][0] * width), mm(y + pegs[peg][1] * height)]
  pdf
    .lineWidth(0.7)
    .moveTo(...at('A'))
    .lineTo(...at('B'))
    .lineTo(...at('C'))
    .lineTo(...at('D'))
    .closePath()
    .stroke(INK)
  pdf
    .lineWidth(0.5)
    .dash(2.2, { space: 1.6 })
    .moveTo(...at('A'))
    .lineTo(...at('C'))
    .moveTo(...at('B'))
    .lineTo(...at('D'))
    .stroke(INK)
    .undash()
  const offset = { A: [-2.8, 2], B: [1.2, 2.4], C: [1.2, 0.4], D: [-3, 0.6] } as const
  for (const peg of ['A', 'B', 'C', 'D'] as const) {
    pdf.circle(...at(peg), 1.6).fill(INK)
    textAt(pdf, peg, x + pegs[peg][0] * width + offset[peg][0], y + pegs[peg][1] * height + offset[peg][1], {
      size: 7.4,
      face: 'bold',
    })
  }
}

/** The mark in one colour: leaves fanned as a sheaf, tied by a band. `x`, `y`: top left; `size`: height, all in mm. */
export function drawMark(pdf: Pdf, x: number, y: number, size: number): void {
  pdf
    .save()
    .translate(mm(x), mm(y))
    .scale(mm(size) / 24)
  for (const angle of [-32, -20, 20, 32]) {
    pdf.save().translate(10, 15).rotate(angle).rect(-2.4, -13, 4.8, 13).lineWidth(1.1).fillAndStroke('#ffffff', INK).restore()
  }
  pdf.path('M6.6 1.5 L11.6 1.5 L13.6 3.6 L13.6 15 L6.6 15 Z').lineWidth(1.3).fillAndStroke('#ffffff', INK)
  pdf.path('M8.4 5.4 L11.8 5.4 M8.4 8 L11.8 8 M8.4 10.6 L11.8 10.6').lineWidth(0.9).stroke(INK)
  pdf.path('M6 17.6 L3.6 23 M10 17.6 L10 23.4 M14 17.6 L16.4 23').lineWidth(1.3).stroke(INK)
  pdf.rect(4.6, 14.4, 10.8, 3.2).fill(INK)
  pdf.restore()
}

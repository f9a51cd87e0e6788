/** A pdfkit page with the project's faces, drawn in millimetres from the top left. */
import { createRequire } from 'node:module'
import PDFDocument from 'pdfkit'

const require = createRequire(import.meta.url)
const MM = 72 / 25.4
export const mm = (value: number) => value * MM

/** pdfkit fails on the variable fonts, so documents embed the static ones. */
const face = (family: 'next' | 'mono', weight: number) =>
  require.resolve(`@fontsource/atkinson-hyperlegible-${family}/files/atkinson-hyperlegible-${family}-latin-${weight}-normal.woff`)

export type Face = 'regular' | 'bold' | 'mono' | 'mono-bold'
export const INK = '#15202b'
export const GREY = '#4a5661'
export const FRAME = '#b4b4b4'

export function newPage(info: { title: string; width_mm: number; height_mm: number }): PDFKit.PDFDocument {
  const pdf = new PDFDocument({
    size: [mm(info.width_mm), mm(info.height_mm)],
    margin: 0,
    info: { Title: info.title, Creator: 'Sheafbook' },
    lang: 'en',
  })
  pdf.registerFont('regular', face('next', 400))
  pdf.registerFont('bold', face('next', 700))
  pdf.registerFont('mono', face('mono', 500))
  pdf.registerFont('mono-bold', face('mono', 700))
  return pdf
}

export interface TextStyle {
  size: number
  face?: Face
  color?: string
  align?: 'left' | 'right' | 'center'
}

/** One line of text whose baseline stands at y; x is its left end, right end or middle by `align`. */
export function textAt(pdf: PDFKit.PDFDocument, text: string, x: number, y: number, style: TextStyle): number {
  pdf
    .font(style.face ?? 'regular')
    .fontSize(style.size)
    .fillColor(style.color ?? INK)
  const width = pdf.widthOfString(text)
  const left = mm(x) - (style.align === 'right' ? width : style.align === 'center' ? width / 2 : 0)
  pdf.text(text, left, mm(y), { lineBreak: false, baseline: 'alphabetic' })
  return width / MM
}

/** Collects the finished document. */
export function finish(pdf: PDFKit.PDFDocument): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const parts: Buffer[] = []
    pdf.on('data', (part: Buffer) => parts.push(part))
    pdf.on('end', () => resolve(Buffer.concat(parts)))
    pdf.on('error', reject)
    pdf.end()
  })
}

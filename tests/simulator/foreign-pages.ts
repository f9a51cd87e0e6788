/** Pages that are no sheets: printed text, and what a telephone shows on its screen. */
import PDFDocument from 'pdfkit'
import sharp from 'sharp'
import { renderPage } from './page-render.ts'
import type { Chance } from './random.ts'

const SYLLABLES = ['ka', 'to', 'ren', 'mil', 'os', 'ba', 'du', 'ler', 'ti', 'no', 'sar', 've'] as const
const A4_POINTS = { width: 595, height: 842 }

const word = (chance: Chance) => Array.from({ length: chance.whole(1, 4) }, () => chance.pick(SYLLABLES)).join('')
const words = (chance: Chance, count: number) => Array.from({ length: count }, () => word(chance)).join(' ')

/** A page of text with a table of numbers, as a PDF. */
export async function textPage(chance: Chance): Promise<Buffer> {
  const pdf = new PDFDocument({ size: 'A4', margin: 50, info: { CreationDate: new Date(0) } })
  const chunks: Buffer[] = []
  pdf.on('data', (chunk: Buffer) => chunks.push(chunk))
  const done = new Promise<void>((resolve) => pdf.on('end', resolve))
  pdf.fontSize(20).text(words(chance, 4)).fontSize(11)
  for (let i = 0; i < chance.whole(3, 9); i += 1) pdf.text(words(chance, chance.whole(20, 70))).moveDown()
  for (let row = 0; row < 12; row += 1) {
    for (let column = 0; column < 5; column += 1) {
      pdf.rect(60 + 90 * column, 540 + 18 * row, 90, 18).stroke()
      pdf.text(String(chance.whole(0, 99_999)), 66 + 90 * column, 544 + 18 * row, { lineBreak: false })
    }
  }
  pdf.end()
  await done
  return Buffer.concat(chunks)
}

/** The same as a picture. */
export async function textPicture(chance: Chance): Promise<Buffer> {
  const size = { width: 2 * A4_POINTS.width, height: 2 * A4_POINTS.height }
  const { width, height, grey } = await renderPage(await textPage(chance), size)
  return sharp(grey, { raw: { width, height, channels: 1 } })
    .jpeg({ quality: 85 })
    .toBuffer()
}

/** A picture of a sheet as a gallery shows it: far too small between bars and buttons. */
export async function screenshot(chance: Chance, sheet: Buffer): Promise<Buffer> {
  const [width, height] = [1080, 2340]
  const shown = await sharp(sheet).resize(chance.whole(260, 520)).toBuffer()
  const bar = (w: number, h: number, grey: number) =>
    sharp({ create: { width: w, height: h, channels: 3, background: { r: grey, g: grey, b: grey } } })
      .png()
      .toBuffer()
  const buttons = await Promise.all(
    [0, 1, 2, 3].map(async (i) => ({ input: await bar(90, 90, 230), left: 90 + 250 * i, top: height - 160 })),
  )
  return sharp({ create: { width, height, channels: 3, background: { r: 18, g: 18, b: 20 } } })
    .composite([
      { input: await bar(width, 120, 60), left: 0, top: 0 },
      { input: shown, left: chance.whole(0, 500), top: chance.whole(200, 1400) },
      ...buttons,
    ])
    .png()
    .toBuffer()
}

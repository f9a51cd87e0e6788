import PDFDocument from 'pdfkit'
import sharp from 'sharp'
import { expect, it } from 'vitest'
import { pagesToPdf } from '../../../tests/simulator/scan-pdf.ts'
import { openPages } from './pages.ts'

/** A small page is as good as a large one, and quicker made, mm. */
const PAGE = { width: 52.5, height: 74.25 }
const POINTS = [PAGE.width * (72 / 25.4), PAGE.height * (72 / 25.4)] as const

/** A page's worth of grain at so many dots an inch. */
const scanOf = (dpi: number) =>
  sharp({
    create: {
      width: Math.round((PAGE.width / 25.4) * dpi),
      height: Math.round((PAGE.height / 25.4) * dpi),
      channels: 3,
      background: '#ddd',
      noise: { type: 'gaussian', mean: 200, sigma: 20 },
    },
  })
    .jpeg()
    .toBuffer()

const pdfWith = (draw: (pdf: PDFKit.PDFDocument) => void): Promise<Buffer> =>
  new Promise((done) => {
    const pdf = new PDFDocument({ size: [...POINTS], margin: 0 })
    const parts: Buffer[] = []
    pdf.on('data', (part: Buffer) => parts.push(part)).on('end', () => done(Buffer.concat(parts)))
    draw(pdf)
    pdf.end()
  })

it('takes a scan out of its page dot for dot, on every page', async () => {
  const scans = [await scanOf(100), await scanOf(120)]
  const pages = await openPages(await pagesToPdf(scans, PAGE))
  expect(pages.count).toBe(2)
  for (const [i, scan] of scans.entries()) {
    const { data, info } = await sharp(scan).raw().toBuffer({ resolveWithObject: true })
    const raster = await pages.raster(i, true)
    expect([raster.width, raster.height, raster.channels]).toEqual([info.width, info.height, info.channels])
    expect(Buffer.compare(Buffer.from(raster.data), data)).toBe(0)
  }
  pages.close()
})

it('decodes a scan finer than reading needs at 220 dots an inch', async () => {
  const pages = await openPages(await pagesToPdf([await scanOf(400)], PAGE))
  expect((await pages.raster(0, false)).width).toBe(Math.round((PAGE.width / 25.4) * 220))
  pages.close()
})

it('draws a page that holds more than its scan', async () => {
  const scan = await scanOf(100)
  const pages = await openPages(
    await pdfWith((pdf) => void pdf.image(scan, 0, 0, { width: POINTS[0], height: POINTS[1] }).text('note', 10, 10)),
  )
  expect((await pages.raster(0, true)).width).toBe(Math.floor(Math.floor(POINTS[0]) * (220 / 72)))
  pages.close()
})

it('reads every page of a TIFF', async () => {
  const pages = await openPages(
    await sharp([await scanOf(50), await scanOf(50)], { join: { animated: true } })
      .tiff()
      .toBuffer(),
  )
  expect(pages.count).toBe(2)
  const [first, second] = [await pages.raster(0, false), await pages.raster(1, false)]
  expect([second.width, second.height]).toEqual([first.width, first.height])
  expect(Buffer.compare(Buffer.from(first.data), Buffer.from(second.data))).not.toBe(0)
  pages.close()
})

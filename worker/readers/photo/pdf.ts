/** Pages of a PDF as pictures: a scan's own JPEG where the page is nothing else, drawn by pdfium otherwise. */
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import { decodeImage } from './decode.ts'
import type { Raster } from './raster.ts'

/** Sharp enough for digits, small enough for a second a page; a page larger than A4 gets less. */
const DPI = 220
const POINTS_PER_INCH = 72
/** A scan finer than this is decoded at DPI: more shows no more of a pen's stroke, and costs time. */
const MOST_DPI = 310
/** A JPEG whose sides stand to each other as the page's, within this, fills the page. */
const SAME_SHAPE = 0.015

export const isPdf = (bytes: Uint8Array): boolean =>
  Buffer.from(bytes.buffer, bytes.byteOffset, Math.min(1024, bytes.byteLength)).includes('%PDF-')

const open = async () => {
  const { PDFiumLibrary } = await import('@hyzyla/pdfium')
  return PDFiumLibrary.init()
}
let opening: ReturnType<typeof open> | undefined

export interface PdfPages {
  count: number
  /** From 0. Colour only where the page is one JPEG and `colour` asks for it. */
  raster(page: number, colour: boolean): Promise<Raster>
  close(): void
}

/** @throws UserError too_large (pages), or not_accepted for a damaged or locked file. */
export async function openPdf(bytes: Uint8Array): Promise<PdfPages> {
  if (bytes.byteLength > FILE_LIMITS.pdf_bytes) {
    throw new UserError('too_large', 'The PDF is larger than 100 MB. Nothing was kept of it. Send it in parts.')
  }
  opening ??= open()
  const document = await (await opening).loadDocument(bytes).catch((cause: unknown) => {
    const locked = /password|security/i.test(String(cause))
    const why = locked
      ? 'The PDF is locked with a password. Save it without one and send that.'
      : 'The PDF is damaged. Scan it again.'
    throw new UserError('not_accepted', why, { cause })
  })
  const count = document.getPageCount()
  if (count > FILE_LIMITS.pdf_pages) {
    document.destroy()
    throw new UserError('too_large', `The PDF has ${count} pages; at most ${FILE_LIMITS.pdf_pages} are taken. Send it in parts.`)
  }
  return {
    count,
    async raster(page, colour) {
      const scan = await onlyJpeg(document.getPage(page))
      if (scan) return decodeImage(scan.bytes, 0, colour, scan.most_px)
      const { originalWidth, originalHeight } = document.getPage(page).getOriginalSize()
      const wanted = DPI / POINTS_PER_INCH
      const most = Math.sqrt(FILE_LIMITS.photo_pixels / (originalWidth * originalHeight))
      const scale = Math.min(wanted, most)
      const { width, height, data } = await document.getPage(page).render({ scale, render: 'bitmap', colorSpace: 'Gray' })
      return { width, height, channels: 1, data }
    },
    close: () => document.destroy(),
  }
}

type PdfPage = ReturnType<Awaited<ReturnType<Awaited<ReturnType<typeof open>>['loadDocument']>>['getPage']>

/** The JPEG that a page consists of, as office scanners make them; null where there is anything else to draw. */
async function onlyJpeg(page: PdfPage): Promise<{ bytes: Uint8Array; most_px?: number } | null> {
  if (page.getObjectCount() !== 1) return null
  const object = page.getObject(0)
  if (object.type !== 'image') return null
  const { data, filters, width, height } = await object.getImageDataRaw()
  if (filters.join() !== 'DCTDecode' || width * height > FILE_LIMITS.photo_pixels) return null
  const { originalWidth, originalHeight } = page.getOriginalSize()
  // A scanner that turns pages lays the picture in sideways: reading finds out which way is up.
  const lying = width > height !== originalWidth > originalHeight
  const [across, down] = lying ? [originalHeight, originalWidth] : [originalWidth, originalHeight]
  if (Math.abs(((width / height) * down) / across - 1) > SAME_SHAPE) return null
  const inches = across / POINTS_PER_INCH
  return width > MOST_DPI * inches ? { bytes: data, most_px: Math.round(DPI * inches) } : { bytes: data }
}

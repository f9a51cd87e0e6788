/** Pages of a PDF as pictures, by pdfium. */
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import type { Raster } from './raster.ts'

/** Sharp enough for digits, small enough for a second a page; a page larger than A4 gets less. */
const DPI = 220
const POINTS_PER_INCH = 72

export const isPdf = (bytes: Uint8Array): boolean =>
  Buffer.from(bytes.buffer, bytes.byteOffset, Math.min(1024, bytes.byteLength)).includes('%PDF-')

const open = async () => {
  const { PDFiumLibrary } = await import('@hyzyla/pdfium')
  return PDFiumLibrary.init()
}
let opening: ReturnType<typeof open> | undefined

export interface PdfPages {
  count: number
  raster(page: number): Promise<Raster>
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
    async raster(page) {
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

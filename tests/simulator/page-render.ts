/** A printed page as grey dots, 300 to the inch. */
import { PDFiumLibrary } from '@hyzyla/pdfium'

export interface Print {
  width: number
  height: number
  /** 0 black, 255 paper. */
  grey: Uint8Array
}

let library: Promise<PDFiumLibrary> | null = null

/**
 * Renders the first page of a PDF.
 * @param size dots across and down: the renderer rounds the page to whole points otherwise, which squeezes it by 0.1 %
 */
export async function renderPage(pdf: Uint8Array, size: { width: number; height: number }): Promise<Print> {
  library ??= PDFiumLibrary.init()
  const document = await (await library).loadDocument(pdf)
  const image = await document.getPage(0).render({ ...size, render: 'bitmap', colorSpace: 'Gray' })
  document.destroy()
  const dots = image.width * image.height
  const step = Math.round(image.data.length / dots)
  const grey = step === 1 ? image.data.slice() : Uint8Array.from({ length: dots }, (_, i) => image.data[i * step]!)
  return { width: image.width, height: image.height, grey }
}

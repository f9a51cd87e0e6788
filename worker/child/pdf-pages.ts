import { FILE_LIMITS } from '../../shared/limits.ts'
import type { ParserAnswer } from './answer.ts'

/** @throws what pdfium throws for a file it cannot open */
export async function countPdfPages(bytes: Uint8Array): Promise<ParserAnswer> {
  const { PDFiumLibrary } = await import('@hyzyla/pdfium')
  const library = await PDFiumLibrary.init()
  const document = await library.loadDocument(bytes)
  const pages = document.getPageCount()
  if (pages === 0) return { kind: 'refused', reason: 'This PDF has no page. Nothing was kept. Scan it again.' }
  if (pages <= FILE_LIMITS.pdf_pages) return { kind: 'pages', pages }
  const reason = `This PDF has ${pages} pages; the most is ${FILE_LIMITS.pdf_pages}. Nothing was kept. Scan fewer sheets into one file.`
  return { kind: 'refused', reason }
}

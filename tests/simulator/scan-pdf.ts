/** A PDF as office scanners make it: one JPEG a page, filling it. */
import PDFDocument from 'pdfkit'

const POINTS_PER_MM = 72 / 25.4

/** Puts each JPEG on a page of its own. The date is fixed so that the same scans make the same file. */
export async function pagesToPdf(pages: readonly Buffer[], size: { width: number; height: number }): Promise<Buffer> {
  const [width, height] = [size.width * POINTS_PER_MM, size.height * POINTS_PER_MM]
  const pdf = new PDFDocument({ size: [width, height], margin: 0, autoFirstPage: false, info: { CreationDate: new Date(0) } })
  const chunks: Buffer[] = []
  pdf.on('data', (chunk: Buffer) => chunks.push(chunk))
  const done = new Promise<void>((resolve) => pdf.on('end', resolve))
  for (const page of pages) pdf.addPage().image(page, 0, 0, { width, height })
  pdf.end()
  await done
  return Buffer.concat(chunks)
}

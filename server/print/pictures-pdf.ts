import { finish, mm, newPage } from './page.ts'

const A4 = { width_mm: 210, height_mm: 297 }

/** One picture a page, each filling an A4 page; null leaves its page empty, so that the others keep their numbers. */
export function picturesAsPdf(title: string, pictures: readonly (Buffer | null)[]): Promise<Buffer> {
  const pdf = newPage({ title, ...A4 })
  pictures.forEach((picture, index) => {
    if (index > 0) pdf.addPage()
    if (picture) pdf.image(picture, 0, 0, { width: mm(A4.width_mm), height: mm(A4.height_mm) })
  })
  return finish(pdf)
}

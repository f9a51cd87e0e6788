import { openPages } from '../readers/photo/pages.ts'

/** One page (from 1) of a file as an upright JPEG, pixel for pixel as the reader sees it. */
export async function drawUpright(bytes: Uint8Array, page: number): Promise<Uint8Array> {
  const { default: sharp } = await import('sharp')
  const pages = await openPages(bytes)
  try {
    const { width, height, channels, data } = await pages.raster(page - 1, true)
    const picture = sharp(data, { raw: { width, height, channels } })
    return await (channels === 4 ? picture.removeAlpha() : picture).jpeg({ quality: 80 }).toBuffer()
  } finally {
    pages.close()
  }
}

/** From a picture file to grey pixels, once a page. */
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import type { Grey } from '../../../shared/reading/pixels/grey.ts'

const loadSharp = async () => {
  const { default: sharp } = await import('sharp')
  // The cache only grows: each page is seen once.
  sharp.cache(false)
  sharp.concurrency(1)
  return sharp
}
let loading: ReturnType<typeof loadSharp> | undefined
/** sharp takes half a second to load, so it is loaded when first needed. */
export const sharpOnce = () => {
  loading ??= loadSharp()
  return loading
}

/**
 * Decodes JPEG, PNG, WebP or one page of a TIFF, turned upright as its camera noted.
 * @throws UserError too_large or not_accepted: what is wrong with the file, and what to do.
 */
export async function decodeGrey(bytes: Uint8Array, page = 0): Promise<Grey> {
  if (bytes.byteLength > FILE_LIMITS.photo_bytes) {
    throw new UserError('too_large', 'The picture is larger than 25 MB. Nothing was kept of it. Send it in a lower quality.')
  }
  const sharp = await sharpOnce()
  try {
    const { data, info } = await sharp(bytes, { limitInputPixels: FILE_LIMITS.photo_pixels, failOn: 'truncated', page })
      .autoOrient()
      .flatten({ background: '#ffffff' })
      .greyscale()
      .raw()
      .toBuffer({ resolveWithObject: true })
    return { width: info.width, height: info.height, data: new Uint8Array(data.buffer, data.byteOffset, data.byteLength) }
  } catch (cause) {
    throw pictureError(cause)
  }
}

export function pictureError(cause: unknown): UserError {
  const message = cause instanceof Error ? cause.message : String(cause)
  if (/pixel limit/i.test(message)) {
    return new UserError('too_large', 'The picture has more than 50 million pixels. Send it in a smaller size.', { cause })
  }
  return new UserError('not_accepted', 'The picture is damaged or incomplete. Take it again, or send the original file.', {
    cause,
  })
}

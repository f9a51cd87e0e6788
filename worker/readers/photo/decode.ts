/** From a picture file to pixels, once a page. */
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import type { Raster } from './raster.ts'

const loadSharp = async () => {
  const { default: sharp } = await import('sharp')
  // The cache only grows: each page is seen once.
  sharp.cache(false)
  sharp.concurrency(1)
  // A stranger's file is never handed to a loader that is not needed.
  sharp.block({ operation: ['VipsForeignLoad'] })
  sharp.unblock({ operation: ['VipsForeignLoadJpeg', 'VipsForeignLoadPng', 'VipsForeignLoadWebp', 'VipsForeignLoadTiff'] })
  return sharp
}
let loading: ReturnType<typeof loadSharp> | undefined
/** sharp takes half a second to load, so it is loaded when first needed. */
export const sharpOnce = () => {
  loading ??= loadSharp()
  return loading
}

const OPEN = { limitInputPixels: FILE_LIMITS.photo_pixels, failOn: 'truncated' } as const

/**
 * What libjpeg says where bits of the picture itself are lost: part of it is then shifted or grey, and could be read as something
 * else. Its other warnings (bytes too many before a marker, odd parameters) come with sound pictures of some phones.
 */
const LOST_BITS = /bad Huffman|premature end of data|instead of RST|Corrupt JPEG data: bad/i

/** Decodes strictly; a warning that costs no part of the picture is passed over by decoding once more. */
async function strictly<T>(decode: (open: { failOn: 'warning' | 'truncated' }) => Promise<T>): Promise<T> {
  try {
    return await decode({ failOn: 'warning' })
  } catch (cause) {
    if (cause instanceof Error && LOST_BITS.test(cause.message)) throw cause
    return decode({ failOn: 'truncated' })
  }
}

/** How many pages a JPEG, PNG, WebP or TIFF file holds. */
export async function countImagePages(bytes: Uint8Array): Promise<number> {
  const sharp = await sharpOnce()
  try {
    const { pages, format } = await sharp(bytes, OPEN).metadata()
    return format === 'tiff' ? Math.min(pages ?? 1, FILE_LIMITS.pdf_pages) : 1
  } catch (cause) {
    throw pictureError(cause)
  }
}

/**
 * Decodes JPEG, PNG, WebP or one page (from 0) of a TIFF, turned upright as its camera noted. Grey is the green of colours: true
 * luma costs as much again as decoding, and green tells blue, black, red and pencil from paper as well.
 * @param most_px a picture wider than this is made so wide while it is decoded, which costs less than decoding it whole
 * @throws UserError too_large or not_accepted: what is wrong with the file, and what to do.
 */
export async function decodeImage(bytes: Uint8Array, page: number, colour: boolean, most_px?: number): Promise<Raster> {
  const sharp = await sharpOnce()
  try {
    const { data, info } = await strictly(async (how) => {
      const image = sharp(bytes, { ...OPEN, ...how, page })
      const { channels = 3 } = await image.metadata()
      const upright = image.autoOrient().flatten({ background: '#ffffff' })
      if (most_px) upright.resize({ width: most_px, withoutEnlargement: true })
      const wanted = channels < 3 ? upright.greyscale() : upright.toColourspace('srgb')
      return (colour || channels < 3 ? wanted : wanted.extractChannel('green')).raw().toBuffer({ resolveWithObject: true })
    })
    return {
      width: info.width,
      height: info.height,
      channels: info.channels === 1 || info.channels === 3 ? info.channels : 4,
      data: new Uint8Array(data.buffer, data.byteOffset, data.byteLength),
    }
  } catch (cause) {
    throw pictureError(cause)
  }
}

export function pictureError(cause: unknown): UserError {
  const message = cause instanceof Error ? cause.message : String(cause)
  if (/pixel limit/i.test(message)) {
    return new UserError('too_large', 'The picture has more than 50 million pixels. Send it in a smaller size.', { cause })
  }
  if (/unsupported image format|blocked/i.test(message)) {
    return new UserError(
      'wrong_kind',
      'This is not a picture or PDF that can be read. Send JPEG, PNG, WebP, TIFF, HEIC or PDF.',
      { cause },
    )
  }
  return new UserError('not_accepted', 'The picture is damaged or incomplete. Take it again, or send the original file.', {
    cause,
  })
}

import type sharp from 'sharp'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import type { UploadKind } from '../../../shared/schemas/upload.ts'
import { type Refusal, refuse, tooLarge } from './refusal.ts'

type PictureKind = Extract<UploadKind, 'jpeg' | 'png' | 'webp' | 'heic' | 'tiff'>

const AGAIN = 'Take the photo again, or send the original file.'
const damaged = (what: string) => refuse(`This picture is damaged: ${what}.`, AGAIN)

/** Only the loaders of what is taken may run: sharp's build would open SVG and more. */
async function loadSharp(): Promise<typeof sharp> {
  const { default: load } = await import('sharp')
  load.block({ operation: ['VipsForeignLoad'] })
  load.unblock({
    operation: [
      'VipsForeignLoadJpegBuffer',
      'VipsForeignLoadPngBuffer',
      'VipsForeignLoadWebpBuffer',
      'VipsForeignLoadTiffBuffer',
    ],
  })
  return load
}
let loading: ReturnType<typeof loadSharp> | undefined

/** Reads headers only: the pixels are decoded once, by the worker. */
export async function checkPicture(kind: PictureKind, bytes: Buffer): Promise<Refusal | null> {
  const most = FILE_LIMITS.photo_bytes
  if (bytes.length > most) return tooLarge('picture', bytes.length, most, 'Send it as the phone makes it, or in a lower quality.')
  const size = kind === 'heic' ? heicSize(bytes) : await headerSize(bytes)
  if (size === null) return damaged('its head cannot be read')
  if (size.width_px * size.height_px > FILE_LIMITS.photo_pixels) {
    const millions = Math.round((size.width_px * size.height_px) / 1e6)
    return refuse(
      `This picture has ${millions} million pixels; the most is ${FILE_LIMITS.photo_pixels / 1e6} million.`,
      'Send it in a smaller size.',
    )
  }
  if (size.pages > (kind === 'tiff' ? FILE_LIMITS.pdf_pages : 1)) {
    return kind === 'tiff'
      ? refuse(`This scan has ${size.pages} pages; the most is ${FILE_LIMITS.pdf_pages}.`, 'Scan fewer sheets into one file.')
      : refuse('This is a moving picture.', 'Send a still photo.')
  }
  return isWhole(kind, bytes) ? null : damaged('its end is missing')
}

interface Size {
  width_px: number
  height_px: number
  pages: number
}

async function headerSize(bytes: Buffer): Promise<Size | null> {
  loading ??= loadSharp()
  const load = await loading
  try {
    const { width, height, pages = 1 } = await load(bytes, { limitInputPixels: false, failOn: 'error' }).metadata()
    return { width_px: width, height_px: height, pages }
  } catch {
    return null
  }
}

/** The largest picture a HEIC announces (ISO/IEC 23008-12, 6.5.3: image spatial extents, two 32-bit sizes after version and flags). */
function heicSize(bytes: Buffer): Size | null {
  let largest: Size | null = null
  for (let at = bytes.indexOf('ispe'); at >= 0 && at + 16 <= bytes.length; at = bytes.indexOf('ispe', at + 4)) {
    const size = { width_px: bytes.readUInt32BE(at + 8), height_px: bytes.readUInt32BE(at + 12), pages: 1 }
    if (largest === null || size.width_px * size.height_px > largest.width_px * largest.height_px) largest = size
  }
  return largest
}

/** A transfer that broke off leaves a head and no end: told here, so that the phone can send again at once. */
function isWhole(kind: PictureKind, bytes: Buffer): boolean {
  if (kind === 'jpeg') return hasJpegEnd(bytes)
  if (kind === 'png') return bytes.includes('IEND', Math.max(0, bytes.length - 65_536))
  if (kind === 'webp') return bytes.readUInt32LE(4) + 8 <= bytes.length
  if (kind === 'heic') return boxesFit(bytes)
  return true
}

/** The end mark of ITU-T T.81 must follow the scan; a thumbnail's own stands before it. */
function hasJpegEnd(bytes: Buffer): boolean {
  let at = 2
  while (at + 4 <= bytes.length && bytes[at] === 0xff && bytes[at + 1] !== 0xda) at += 2 + bytes.readUInt16BE(at + 2)
  return bytes.indexOf(Buffer.from([0xff, 0xd9]), Math.min(at, bytes.length)) >= 0
}

/** The boxes on the top level (ISO/IEC 14496-12, 4.2) end where the file ends. */
function boxesFit(bytes: Buffer): boolean {
  let at = 0
  while (at + 8 <= bytes.length) {
    const short = bytes.readUInt32BE(at)
    const size = short === 1 && at + 16 <= bytes.length ? Number(bytes.readBigUInt64BE(at + 8)) : short
    if (size === 0) return true
    if (size < 8) return false
    at += size
  }
  return at === bytes.length
}

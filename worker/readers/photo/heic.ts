/** Pictures as some phones keep them (HEIC): decoded by libheif, since sharp's build reads none. Slow: about 2 s for 12 MP. */
import { createRequire } from 'node:module'
import { z } from 'zod'
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import { pictureError } from './decode.ts'
import type { Raster } from './raster.ts'

const require = createRequire(import.meta.url)
const BRANDS = ['heic', 'heix', 'mif1', 'msf1', 'hevc', 'hevx']

export function isHeic(bytes: Uint8Array): boolean {
  const text = (from: number) => String.fromCharCode(...bytes.subarray(from, from + 4))
  return text(4) === 'ftyp' && BRANDS.includes(text(8))
}

type Decode = (input: { buffer: Uint8Array }) => Promise<unknown>
type DecodeAll = (input: { buffer: Uint8Array }) => Promise<unknown>

const sizesSchema = z.array(z.object({ width: z.number(), height: z.number() })).min(1)
const imageSchema = z.object({ width: z.number(), height: z.number(), data: z.instanceof(Uint8ClampedArray) })

/** @throws UserError too_large or not_accepted. */
export async function decodeHeic(bytes: Uint8Array): Promise<Raster> {
  const decode = require('heic-decode') as Decode & { all: DecodeAll }
  try {
    const all = (await decode.all({ buffer: bytes })) as object & { dispose: () => void }
    const [size] = sizesSchema.parse(all)
    all.dispose()
    if (size!.width * size!.height > FILE_LIMITS.photo_pixels) {
      throw new UserError('too_large', 'The picture has more than 50 million pixels. Send it in a smaller size.')
    }
    const { width, height, data } = imageSchema.parse(await decode({ buffer: bytes }))
    return { width, height, channels: 4, data: new Uint8Array(data.buffer, data.byteOffset, data.byteLength) }
  } catch (cause) {
    throw cause instanceof UserError ? cause : pictureError(cause)
  }
}

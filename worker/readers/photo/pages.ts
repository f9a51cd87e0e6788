/** What a file holds, by its content and not its name: one picture or several pages. */
import { UserError } from '../../../shared/errors.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import { countImagePages, decodeImage } from './decode.ts'
import { decodeHeic, isHeic } from './heic.ts'
import { isPdf, openPdf } from './pdf.ts'
import type { Raster } from './raster.ts'

export interface Pages {
  count: number
  /** Pixels of one page, from 0. Colour where the file has it and `colour` asks for it. */
  raster(page: number, colour: boolean): Promise<Raster>
  close(): void
}

/** @throws UserError: too large, damaged, locked, or of a kind that is not read. */
export async function openPages(bytes: Uint8Array): Promise<Pages> {
  if (bytes.byteLength === 0) throw new UserError('not_accepted', 'The file is empty. Send it again.')
  if (isPdf(bytes)) return openPdf(bytes)
  if (bytes.byteLength > FILE_LIMITS.photo_bytes) {
    throw new UserError('too_large', 'The picture is larger than 25 MB. Nothing was kept of it. Send it in a lower quality.')
  }
  if (isHeic(bytes)) return { count: 1, raster: () => decodeHeic(bytes), close() {} }
  return {
    count: await countImagePages(bytes),
    raster: (page, colour) => decodeImage(bytes, page, colour),
    close() {},
  }
}

import { FILE_LIMITS } from '../../shared/limits.ts'
import type { ParserAnswer } from './answer.ts'

/** @throws what sharp throws for a file it cannot open */
export async function countTiffPages(bytes: Uint8Array): Promise<ParserAnswer> {
  const { default: sharp } = await import('sharp')
  const { pages = 1 } = await sharp(bytes, { limitInputPixels: FILE_LIMITS.photo_pixels }).metadata()
  return { kind: 'pages', pages }
}

/** What kind of file the bytes are. The name never decides; it can only speak against a file. */
import type { UploadKind } from '../../../shared/schemas/upload.ts'
import { type Refusal, refuse } from './refusal.ts'

/** What a person may send, in their words. */
const TAKEN = 'Send a photo (JPEG, PNG, WebP, HEIC), a scan (PDF, TIFF) or a form of ours (XLSX, CSV).'
/** Bytes enough for every signature looked for. */
export const HEAD_BYTES = 4_100

const BY_TYPE: Partial<Record<string, UploadKind>> = {
  jpg: 'jpeg',
  png: 'png',
  webp: 'webp',
  heic: 'heic',
  heif: 'heic',
  pdf: 'pdf',
}
/** Zip files start alike; whether one is a workbook is seen in its directory. */
const ZIP_TYPES = new Set(['zip', 'xlsx', 'xlsm', 'xltx', 'ods', 'odt', 'docx', 'pptx'])
/** A camera may give no name at all; a name that promises another kind of file is refused. */
const PICTURES = ['jpg', 'jpeg', 'jpe', 'jfif', 'png', 'webp', 'heic', 'heif', 'hif', 'tif', 'tiff']
const EXTENSIONS = new Set(['', ...PICTURES, 'pdf', 'xlsx', 'csv', 'txt', 'tsv'])

/** TIFF 6.0, section 2: byte order and 42. What else a TIFF is stands in its directory, often at its very end. */
const TIFF = [Buffer.from('II*\0', 'latin1'), Buffer.from('MM\0*', 'latin1')]
/** Locked and old workbooks share this container (compound file binary). */
const COMPOUND = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]

/**
 * @param head the first HEAD_BYTES of the file
 * @param bytes its full length
 */
export async function sniffKind(head: Buffer, bytes: number, fileName: string): Promise<UploadKind | Refusal> {
  if (bytes === 0)
    return refuse('The file is empty.', 'Send it again; if it stays empty, take the photo anew or save the form once more.')
  const extension = extensionOf(fileName)
  if (!EXTENSIONS.has(extension)) return refuse(`A file of the kind ".${extension}" is not taken.`, TAKEN)
  if (COMPOUND.every((byte, i) => head[i] === byte)) {
    return refuse(
      'This is a workbook locked with a password, or one of the old binary kind.',
      'Save it as XLSX without a password and send that.',
    )
  }
  if (TIFF.some((mark) => head.subarray(0, 4).equals(mark))) return 'tiff'
  const { fileTypeFromBuffer } = await import('file-type')
  const type = (await fileTypeFromBuffer(head).catch(() => undefined))?.ext
  if (type === undefined) return isText(head) ? 'csv' : refuse('What this file is cannot be told from its content.', TAKEN)
  if (ZIP_TYPES.has(type)) return 'xlsx'
  return BY_TYPE[type] ?? refuse(`By its content this file is of the kind "${type}", which is not taken.`, TAKEN)
}

const extensionOf = (fileName: string) => /\.([a-z0-9]{1,8})$/i.exec(fileName)?.[1]?.toLowerCase() ?? ''

export const isNamedAsPicture = (fileName: string) => PICTURES.includes(extensionOf(fileName))

/** Text has no zero bytes, unless it is UTF-16 and says so. */
function isText(head: Buffer): boolean {
  const utf16 = (head[0] === 0xff && head[1] === 0xfe) || (head[0] === 0xfe && head[1] === 0xff)
  return utf16 || !head.includes(0)
}

import type { UploadKind } from '../../../shared/schemas/upload.ts'
import { checkCsv } from './check-csv.ts'
import { checkPdf } from './check-pdf.ts'
import { checkPicture } from './check-picture.ts'
import { checkWorkbook } from './check-workbook.ts'
import { isRefusal, type Refusal, refuse } from './refusal.ts'
import { HEAD_BYTES, isNamedAsPicture, sniffKind } from './sniff.ts'

/** Text under a picture's name was never meant as a form: advice about forms would lead astray. */
const NO_PICTURE = refuse(
  'This is not a picture: by its content it is text, whatever its name says.',
  'Take the photo again, or send the original file.',
)

/** A file that may come in, or the reason why not; `kind` where it could be told. */
export type Checked = { kind: UploadKind; refusal: null } | { kind: UploadKind | null; refusal: Refusal }

/** @param fileName as sent; it decides nothing by itself */
export async function checkFile(bytes: Buffer, fileName: string): Promise<Checked> {
  const kind = await sniffKind(bytes.subarray(0, HEAD_BYTES), bytes.length, fileName)
  if (isRefusal(kind)) return { kind: null, refusal: kind }
  const refusal = await checkKind(kind, bytes)
  if (refusal && kind === 'csv' && isNamedAsPicture(fileName)) return { kind: null, refusal: NO_PICTURE }
  return refusal ? { kind, refusal } : { kind, refusal: null }
}

async function checkKind(kind: UploadKind, bytes: Buffer): Promise<Refusal | null> {
  if (kind === 'xlsx') return checkWorkbook(bytes)
  if (kind === 'csv') return checkCsv(bytes)
  if (kind === 'pdf') return checkPdf(bytes)
  return checkPicture(kind, bytes)
}

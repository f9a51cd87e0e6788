import type { UploadKind } from '../../../shared/schemas/upload.ts'
import { checkCsv } from './check-csv.ts'
import { checkPdf } from './check-pdf.ts'
import { checkPicture } from './check-picture.ts'
import { checkWorkbook } from './check-workbook.ts'
import { isRefusal, type Refusal } from './refusal.ts'
import { HEAD_BYTES, sniffKind } from './sniff.ts'

/** A file that may come in, or the reason why not; `kind` where it could be told. */
export type Checked = { kind: UploadKind; refusal: null } | { kind: UploadKind | null; refusal: Refusal }

/** @param fileName as sent; it decides nothing by itself */
export async function checkFile(bytes: Buffer, fileName: string): Promise<Checked> {
  const kind = await sniffKind(bytes.subarray(0, HEAD_BYTES), bytes.length, fileName)
  if (isRefusal(kind)) return { kind: null, refusal: kind }
  const refusal = await checkKind(kind, bytes)
  return refusal ? { kind, refusal } : { kind, refusal: null }
}

async function checkKind(kind: UploadKind, bytes: Buffer): Promise<Refusal | null> {
  if (kind === 'xlsx') return checkWorkbook(bytes)
  if (kind === 'csv') return checkCsv(bytes)
  if (kind === 'pdf') return checkPdf(bytes)
  return checkPicture(kind, bytes)
}

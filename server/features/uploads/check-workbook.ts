import yauzl, { type Entry, type ZipFile } from 'yauzl'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import { type Refusal, refuse, sizeText, tooLarge } from './refusal.ts'

const BOMB_ADVICE = "Take a fresh form from the layout's page and copy the values over."
const ENCRYPTED_BIT = 1

/**
 * Looks at the zip directory before anything is unpacked (entries, unpacked size, ratio), then unpacks once into nothing,
 * counting: a directory can lie.
 */
export async function checkWorkbook(bytes: Buffer): Promise<Refusal | null> {
  if (bytes.length > FILE_LIMITS.xlsx_bytes)
    return tooLarge('workbook', bytes.length, FILE_LIMITS.xlsx_bytes, 'Send the runs in several files.')
  try {
    const zip = await yauzl.fromBufferPromise(bytes, { lazyEntries: true, validateEntrySizes: true })
    try {
      return await checkZip(zip, bytes.length)
    } finally {
      zip.close()
    }
  } catch {
    return refuse(
      'This workbook is damaged: it cannot be unpacked.',
      'Open it in a spreadsheet program, save it again as XLSX and send that.',
    )
  }
}

async function checkZip(zip: ZipFile, packed: number): Promise<Refusal | null> {
  if (zip.entryCount > FILE_LIMITS.xlsx_entries) {
    return refuse(`This workbook has ${zip.entryCount} parts; the most is ${FILE_LIMITS.xlsx_entries}.`, BOMB_ADVICE)
  }
  const entries: Entry[] = []
  for await (const entry of zip.eachEntry()) entries.push(entry)
  if (entries.some((entry) => entry.generalPurposeBitFlag & ENCRYPTED_BIT)) {
    return refuse('This workbook is locked with a password.', 'Save it without a password and send that.')
  }
  const unpacked = entries.reduce((sum, entry) => sum + entry.uncompressedSize, 0)
  if (unpacked > FILE_LIMITS.xlsx_unpacked_bytes || unpacked > packed * FILE_LIMITS.xlsx_ratio) {
    return refuse(
      `This workbook would unpack from ${sizeText(packed)} to ${sizeText(unpacked)}, which no form does.`,
      BOMB_ADVICE,
    )
  }
  const names = new Set(entries.map((entry) => entry.fileName))
  if (!names.has('[Content_Types].xml') || !names.has('xl/workbook.xml')) {
    return refuse('This is a zip file, but not a workbook (XLSX).', 'Send a form of ours (XLSX, CSV), or the photos one by one.')
  }
  for (const entry of entries) await unpack(zip, entry)
  return null
}

/** yauzl breaks off when an entry unpacks to another size than the directory says. */
async function unpack(zip: ZipFile, entry: Entry): Promise<void> {
  const stream = await zip.openReadStreamPromise(entry)
  for await (const _ of stream) {
    // Only counted.
  }
}

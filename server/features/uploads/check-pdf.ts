import { FILE_LIMITS } from '../../../shared/limits.ts'
import { type Refusal, refuse, tooLarge } from './refusal.ts'

/** What can be told of a PDF without opening it; the worker opens it in a process of its own, and counts its pages. */
export function checkPdf(bytes: Buffer): Refusal | null {
  if (bytes.length > FILE_LIMITS.pdf_bytes)
    return tooLarge('PDF', bytes.length, FILE_LIMITS.pdf_bytes, 'Scan fewer sheets into one file.')
  if (isLocked(bytes)) {
    return refuse('This PDF is locked (encrypted).', 'Save it without a password or printing restrictions and send that.')
  }
  // ISO 32000-1, annex H: readers look for the end mark in the last 1024 bytes; scanners may pad.
  if (!bytes.subarray(-2048).includes('%%EOF')) {
    return refuse('This PDF is damaged: its end is missing.', 'Scan it again, or send the file once more from where it is whole.')
  }
  return null
}

/**
 * ISO 32000-1, 7.5.5: the trailer's Encrypt entry; 7.5.8: the same entry stands in the open in a cross-reference stream's
 * dictionary. The bytes are searched as they are: as a string the largest scan would take up twice its size again.
 */
function isLocked(bytes: Buffer): boolean {
  for (let at = bytes.indexOf('/Encrypt'); at >= 0; at = bytes.indexOf('/Encrypt', at + 8)) {
    if (/^\s*(\d+\s+\d+\s+R|<<)/.test(bytes.toString('latin1', at + 8, at + 40))) return true
  }
  return false
}

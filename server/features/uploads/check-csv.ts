import { FORM_HEAD, parseCsvHeading } from '../../../shared/layouts/form.ts'
import { FILE_LIMITS } from '../../../shared/limits.ts'
import { type Refusal, refuse, tooLarge } from './refusal.ts'

/** Text is taken when its first line is the heading of a form of ours. */
export function checkCsv(bytes: Buffer): Refusal | null {
  if (bytes.length > FILE_LIMITS.csv_bytes)
    return tooLarge('text file', bytes.length, FILE_LIMITS.csv_bytes, 'Send the runs in several files.')
  const head = bytes.subarray(0, 64_000)
  const text =
    head[0] === 0xff
      ? head.toString('utf16le')
      : head[0] === 0xfe
        ? Buffer.from(head).swap16().toString('utf16le')
        : head.toString('utf8')
  const line = text.replace(/^\ufeff/, '').split(/[\r\n]/, 1)[0] ?? ''
  const keys = line.split(/[,;\t]/).map((cell) => parseCsvHeading(cell.replace(/^"|"$/g, ''))?.key)
  if (keys.includes(FORM_HEAD.layout) && keys.includes(FORM_HEAD.version)) return null
  return refuse(
    'This is text, but not a CSV form of ours: its first line does not name our columns.',
    "Take a fresh form from the layout's page and copy the values over.",
  )
}

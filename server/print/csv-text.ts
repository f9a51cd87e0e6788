/** CSV by RFC 4180: commas, CRLF, quotes doubled inside quotes. For headings and texts of our own, which no formula starts. */
export function csvLine(fields: ReadonlyArray<string | number>): string {
  return `${fields.map((field) => (/[",\r\n]/.test(String(field)) ? `"${String(field).replaceAll('"', '""')}"` : String(field))).join(',')}\r\n`
}

/** What a spreadsheet program would run as a formula when it opens the file (OWASP ASVS 5.0, 1.2.10). */
const LIVE = /^[\s\uFEFF]*[=+\-@\t\r\n\0|]/

/** Text that cannot be run: an apostrophe in front, which spreadsheet programs hide. Numbers never come here. */
export const safeText = (text: string): string => (LIVE.test(text) ? `'${text}` : text)

/** A line of data: numbers untouched with a decimal point, blanks empty, text made harmless. */
export function dataLine(values: ReadonlyArray<string | number | boolean | null>): string {
  return csvLine(
    values.map((v) => (v === null ? '' : typeof v === 'string' ? safeText(v) : typeof v === 'boolean' ? String(v) : v)),
  )
}

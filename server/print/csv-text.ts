const quoted = (text: string): string => (/[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text)

/** CSV by RFC 4180: commas, CRLF, quotes doubled inside quotes. For headings and texts of our own, which no formula starts. */
export const csvLine = (fields: ReadonlyArray<string | number>): string =>
  `${fields.map((field) => quoted(String(field))).join(',')}\r\n`

/** What a spreadsheet program would run as a formula when it opens the file (OWASP ASVS 5.0, 1.2.10). */
const LIVE = /^[\s\uFEFF]*[=+\-@\t\r\n\0|]/

/** Text that cannot be run: an apostrophe in front, which spreadsheet programs hide. Numbers never come here. */
export const safeText = (text: string): string => (LIVE.test(text) ? `'${text}` : text)

/** A line of data: numbers untouched with a decimal point, blanks empty, text made harmless. */
export const dataLine = (values: ReadonlyArray<string | number | boolean | null>): string =>
  `${values.map((v) => (typeof v === 'string' ? quoted(safeText(v)) : v === null ? '' : String(v))).join(',')}\r\n`

/** CSV by RFC 4180: commas, CRLF, quotes doubled inside quotes. For headings and texts of our own, which no formula starts. */
export function csvLine(fields: ReadonlyArray<string | number>): string {
  return `${fields.map((field) => (/[",\r\n]/.test(String(field)) ? `"${String(field).replaceAll('"', '""')}"` : String(field))).join(',')}\r\n`
}

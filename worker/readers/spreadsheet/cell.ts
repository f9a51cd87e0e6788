/** What one spreadsheet cell holds, whatever the file format. */
export type Cell =
  | { kind: 'empty' }
  | { kind: 'number'; number: number }
  | { kind: 'text'; text: string }
  | { kind: 'boolean'; boolean: boolean }
  /** A number shown as a date or a clock: days since 1899-12-30, as a spreadsheet counts, without a time zone. */
  | { kind: 'serial'; serial_d: number }
  /** Nothing usable: an error, a formula that was never calculated, part of a merged cell. */
  | { kind: 'broken'; text: string; why: string }

/** The day before day 1 of the spreadsheet calendar, shifted by the calendar's own 29 February 1900. */
const EPOCH_MS = Date.UTC(1899, 11, 30)
const DAY_MS = 86_400_000

export const serialOf = (date: Date) => (date.getTime() - EPOCH_MS) / DAY_MS

/** A serial's calendar day, YYYY-MM-DD. */
export const dayOf = (serial_d: number) => new Date(EPOCH_MS + Math.floor(serial_d) * DAY_MS).toISOString().slice(0, 10)

/** A serial's clock time rounded to the second: HH:MM, or HH:MM:SS when there are seconds. */
export function clockOf(serial_d: number): string {
  const seconds = Math.round((serial_d - Math.floor(serial_d)) * 86_400) % 86_400
  const parts = [Math.floor(seconds / 3600), Math.floor(seconds / 60) % 60, seconds % 60].map((n) => String(n).padStart(2, '0'))
  return (parts[2] === '00' ? parts.slice(0, 2) : parts).join(':')
}

/** The cell as text, as far as it can be told, or null when empty. */
export function rawOf(cell: Cell): string | null {
  switch (cell.kind) {
    case 'empty':
      return null
    case 'number':
      return String(cell.number)
    case 'boolean':
      return cell.boolean ? 'TRUE' : 'FALSE'
    case 'serial':
      return cell.serial_d < 1
        ? clockOf(cell.serial_d)
        : cell.serial_d % 1 === 0
          ? dayOf(cell.serial_d)
          : `${dayOf(cell.serial_d)} ${clockOf(cell.serial_d)}`
    default:
      return cell.text
  }
}

/** Moments in the reader's own time, written short: "today 09:40", "Tue 10:16", "13 Oct 2026". */

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const
const DAYS = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat'] as const
export const DAY_MS = 86_400_000

const two = (n: number) => String(n).padStart(2, '0')

export const clockOf = (moment: string | Date): string => {
  const at = new Date(moment)
  return `${two(at.getHours())}:${two(at.getMinutes())}`
}

export const dayOf = (moment: string | Date): Date => {
  const at = new Date(moment)
  return new Date(at.getFullYear(), at.getMonth(), at.getDate())
}

export const weekdayOf = (moment: string | Date): string => DAYS[new Date(moment).getDay()] ?? ''

/** "13 Oct 2026" from a moment, or from a calendar date as text (which has no time zone). */
export function dateText(moment: string | Date): string {
  const calendar = typeof moment === 'string' ? /^(\d{4})-(\d{2})-(\d{2})$/.exec(moment) : null
  if (calendar) return `${Number(calendar[3])} ${MONTHS[Number(calendar[2]) - 1] ?? ''} ${calendar[1]}`
  const at = new Date(moment)
  return `${at.getDate()} ${MONTHS[at.getMonth()]} ${at.getFullYear()}`
}

/** "today 07:15", "Tue 10:16" within a week, else "13 Oct 07:15". */
export function momentText(moment: string | Date, now: Date = new Date()): string {
  const days = Math.round((dayOf(now).getTime() - dayOf(moment).getTime()) / DAY_MS)
  if (days === 0) return `today ${clockOf(moment)}`
  if (days > 0 && days < 7) return `${weekdayOf(moment)} ${clockOf(moment)}`
  const at = new Date(moment)
  const year = at.getFullYear() === now.getFullYear() ? '' : ` ${at.getFullYear()}`
  return `${at.getDate()} ${MONTHS[at.getMonth()]}${year} ${clockOf(at)}`
}

/** Today as a calendar date, "2026-10-13", in the reader's own time. */
export function todayText(now: Date = new Date()): string {
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`
}

/** Dates of run, upload and photo. */
import { type Found, found, type Rule } from './rule.ts'
import { figure } from './text.ts'

const DAY_MS = 86_400_000

/** Days since 1970 of YYYY-MM-DD; null when there is no such day. */
export function dayNumber(date: string | null): number | null {
  const parts = /^(\d{4})-(\d{2})-(\d{2})$/.exec(date ?? '')
  if (!parts) return null
  const [year, month, day] = [Number(parts[1]), Number(parts[2]), Number(parts[3])]
  const at = new Date(Date.UTC(year, month - 1, day))
  return at.getUTCMonth() === month - 1 && at.getUTCDate() === day ? Math.round(at.getTime() / DAY_MS) : null
}

const FIRST_DAY = '2000-01-01'

const q03: Rule = {
  id: 'Q03',
  version: 1,
  name: 'date in the future, or old',
  severity: ['stop', 'note'],
  cells: ['trial_date'],
  why: 'A misread year, or a date put back [P].',
  check: (ctx) => {
    const date = ctx.text('trial_date')
    if (date === null) return []
    const day = dayNumber(date)
    if (day === null) return [found('stop', ['trial_date'], `${date} is no day of the calendar.`, { trial_date: date })]
    const today = ctx.facts.today ?? null
    const [now, come] = [dayNumber(today), dayNumber(ctx.facts.arrivedOn ?? today)]
    if (now !== null && day > now)
      return [
        found('stop', ['trial_date'], `The run is dated ${date}, today is ${today}.`, { trial_date: date, today: today ?? '' }),
      ]
    if (date < FIRST_DAY)
      return [
        found('stop', ['trial_date'], `The run is dated ${date}, before ${FIRST_DAY}: a misread year?`, { trial_date: date }),
      ]
    const most = ctx.limit('late_days')
    return come !== null && come - day > most
      ? [
          found('note', ['trial_date'], `Late: the sheet came ${come - day} days after the run; ${most} are usual.`, {
            trial_date: date,
            days: come - day,
          }),
        ]
      : []
  },
}

const q58: Rule = {
  id: 'Q58',
  version: 1,
  name: 'place and photo',
  severity: ['note'],
  cells: ['trial_date', 'place_id'],
  why: 'A photo from another day or place is weak evidence [P].',
  check: (ctx) => {
    const { photoTakenOn, photoDistance_km } = ctx.facts
    const date = ctx.text('trial_date')
    const out: Found[] = []
    if (photoTakenOn && date && photoTakenOn !== date)
      out.push(
        found('note', ['trial_date'], `Photo of ${photoTakenOn}, run of ${date}.`, { photo: photoTakenOn, trial_date: date }),
      )
    const most = ctx.limit('photo_km')
    if (photoDistance_km != null && photoDistance_km > most)
      out.push(
        found(
          'note',
          ctx.readings.place_id === undefined ? [] : ['place_id'],
          `The photo was taken ${figure(photoDistance_km, 1)} km from the place.`,
          { distance_km: photoDistance_km, most_km: most },
        ),
      )
    return out
  },
}

export const dateRules: readonly Rule[] = [q03, q58]

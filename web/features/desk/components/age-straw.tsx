import { DAY_MS, dayOf, weekdayOf } from '../../../lib/time.ts'

export const AGE_PX = 110
const EAR_PX = 20
/** Older sheets begin at the left edge. */
const MOST_DAYS = 14

/** From which moment the list's age is drawn: the day of its oldest sheet, at least three days back. */
export function ageFrom(arrivals: readonly string[], now: Date): Date {
  const oldest = Math.min(...arrivals.map((at) => dayOf(at).getTime()), now.getTime() - 2 * DAY_MS)
  return dayOf(new Date(Math.max(oldest, now.getTime() - MOST_DAYS * DAY_MS)))
}

const placeOf = (moment: number, from: Date, now: Date) =>
  ((Math.max(moment, from.getTime()) - from.getTime()) / Math.max(1, now.getTime() - from.getTime())) * AGE_PX

const daysBetween = (from: Date, now: Date) => {
  const days: Date[] = []
  for (let at = from.getTime(); at <= now.getTime(); at += DAY_MS) days.push(new Date(at))
  return days
}

/** The days as a head over the straws. */
export function AgeHead({ from, now }: { from: Date; now: Date }) {
  const days = daysBetween(from, now)
  return (
    <svg aria-hidden="true" width={AGE_PX} height="22" className="block" fill="var(--graphite)" fontSize="12">
      {days.map((day) => {
        const x = placeOf(day.getTime(), from, now)
        const room = placeOf(day.getTime() + DAY_MS, from, now) - x
        return room > 26 && x < AGE_PX - 50 ? (
          <text key={day.getTime()} x={x + 3} y="16">
            {weekdayOf(day)}
          </text>
        ) : null
      })}
      <text x={AGE_PX - 2} y="16" textAnchor="end" fontWeight="700" fill="var(--ink)">
        now
      </text>
    </svg>
  )
}

/** A straw from the moment a sheet came to now: the list shows its own age as a sheaf. */
export function AgeStraw({ arrivedAt, from, now, held }: { arrivedAt: string; from: Date; now: Date; held: boolean }) {
  const x = Math.min(placeOf(new Date(arrivedAt).getTime(), from, now), AGE_PX - EAR_PX)
  return (
    <svg
      aria-hidden="true"
      width={AGE_PX}
      height="30"
      className="-my-[3px] block"
      fill="none"
      stroke="var(--ink)"
      strokeWidth="1.3"
    >
      {daysBetween(from, now).map((day) => {
        const at = placeOf(day.getTime(), from, now)
        return <path key={day.getTime()} d={`M${at + 0.5} 0V30`} stroke="var(--feint)" strokeWidth="1" />
      })}
      <path d={`M${AGE_PX - 1} 0V30`} strokeWidth="2" />
      {held ? (
        <rect x={x + EAR_PX - 4} y="11" width={AGE_PX - x - EAR_PX + 3} height="8" fill="var(--straw)" />
      ) : (
        <path d={`M${x + EAR_PX - 3} 15H${AGE_PX}`} />
      )}
      {[0, 5, 10].map((step) => (
        <path
          key={step}
          d={`M${x + step + 2} 15C${x + step + 2} 10 ${x + step + 7} 9 ${x + step + 10} 9 ${x + step + 9} 13 ${x + step + 7} 15 ${x + step + 2} 15M${x + step + 2} 15C${x + step + 2} 20 ${x + step + 7} 21 ${x + step + 10} 21 ${x + step + 9} 17 ${x + step + 7} 15 ${x + step + 2} 15`}
          fill={held ? 'var(--straw)' : 'none'}
        />
      ))}
    </svg>
  )
}

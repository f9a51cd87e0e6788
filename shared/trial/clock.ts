/**
 * Times of a run from clock readings. Local 24 h clock, HH:MM or HH:MM:SS; everything here is in minutes.
 * Midnight: an end before the start is the next day when that makes the run at most 12 h; otherwise the end was written in
 * 12 h and no time is computed.
 */
import { indexes, type Readings, textAt } from './readings.ts'

/** Longest run: anything longer is a misread clock. */
export const LONGEST_RUN_MIN = 12 * 60
const DAY_MIN = 24 * 60

/** Minutes since midnight; null when it is no time of day. */
export function clockMinutes(text: string | null): number | null {
  const found = /^(\d{1,2}):([0-5]\d)(?::([0-5]\d))?$/.exec(text ?? '')
  if (!found) return null
  const hour = Number(found[1])
  return hour > 23 ? null : hour * 60 + Number(found[2]) + Number(found[3] ?? 0) / 60
}

/** Minutes since midnight as HH:MM, for texts. */
export function clockText(minutes: number): string {
  const whole = ((Math.round(minutes) % DAY_MIN) + DAY_MIN) % DAY_MIN
  return `${String(Math.floor(whole / 60)).padStart(2, '0')}:${String(whole % 60).padStart(2, '0')}`
}

export interface Stop {
  n: number
  /** Minutes since the start of the run; null when not written or no time. */
  from_min: number | null
  to_min: number | null
  engineOff: boolean
  reason: string | null
  /** Cells of this stop that are on the sheet. */
  cells: string[]
}

export type Run =
  | { state: 'blank'; cells: string[] }
  /** End and start are the same, or 12 h apart in writing: see `kind`. */
  | { state: 'impossible'; kind: 'twelve_hour' | 'no_time' | 'too_long'; start_min: number; end_min: number; cells: string[] }
  | { state: 'known'; start_min: number; gross_min: number; overMidnight: boolean; cells: string[] }

/** Start, end and what lies between, before any stop is taken out. */
export function runOf(readings: Readings): Run {
  const cells = ['t_start', 't_end']
  const start_min = clockMinutes(textAt(readings, 't_start'))
  const end_min = clockMinutes(textAt(readings, 't_end'))
  if (start_min === null || end_min === null) return { state: 'blank', cells }
  if (end_min === start_min) return { state: 'impossible', kind: 'no_time', start_min, end_min, cells }
  const overMidnight = end_min < start_min
  const gross_min = overMidnight ? end_min + DAY_MIN - start_min : end_min - start_min
  if (gross_min > LONGEST_RUN_MIN)
    return { state: 'impossible', kind: overMidnight ? 'twelve_hour' : 'too_long', start_min, end_min, cells }
  return { state: 'known', start_min, gross_min, overMidnight, cells }
}

/**
 * Minutes from the start of the run to a clock reading, on whichever day is nearer (no run is longer than 12 h): negative
 * for what was read before the start.
 */
export function sinceStart(run: Extract<Run, { state: 'known' }>, text: string | null): number | null {
  const minutes = clockMinutes(text)
  if (minutes === null) return null
  const since = minutes - run.start_min
  if (since < -LONGEST_RUN_MIN) return since + DAY_MIN
  return since > LONGEST_RUN_MIN ? since - DAY_MIN : since
}

/** The stops written on the sheet, filled or half filled. */
export function stopsOf(readings: Readings, run: Run): Stop[] {
  const numbers = new Set(['stop_from', 'stop_to', 'stop_engine_off'].flatMap((stem) => indexes(readings, stem)))
  return [...numbers]
    .sort((a, b) => a - b)
    .map((n) => {
      const key = (stem: string) => `${stem}[${n}]`
      const at = (stem: string) => (run.state === 'known' ? sinceStart(run, textAt(readings, key(stem))) : null)
      return {
        n,
        from_min: at('stop_from'),
        to_min: at('stop_to'),
        engineOff: readings[key('stop_engine_off')] === true || readings[key('stop_engine')] === 'off',
        reason: textAt(readings, key('stop_reason')),
        cells: ['stop_from', 'stop_to', 'stop_engine_off']
          .map(key)
          .filter((cell) => readings[cell] != null && readings[cell] !== false),
      }
    })
    .filter((stop) => stop.cells.length > 0)
}

/** Stops that are no field time though the engine ran. The rest (top-up, clog, adjusting) belongs to the work. */
const OUTSIDE_WORK = ['breakdown', 'speech', 'travel']

export interface Times {
  gross_min: number
  /** T of litres per hour: stops with the engine off are out. */
  fuel_min: number
  /** T_f of the capacities: the other excluded stops are out as well. */
  field_min: number
  stopsOutOfFuel: number
  stopsOutOfField: number
  fuelCells: string[]
  fieldCells: string[]
  /** Finest step all clock readings in it show, minutes. */
  step_min: number
}

/** T and T_f; null when the clock does not tell them (a stop with the engine off that is only half written hides T). */
export function timesOf(readings: Readings): Times | null {
  const run = runOf(readings)
  if (run.state !== 'known') return null
  const stops = stopsOf(readings, run)
  const length = (stop: Stop) => (stop.from_min === null || stop.to_min === null ? null : stop.to_min - stop.from_min)
  const off = stops.filter((stop) => stop.engineOff)
  const idle = stops.filter((stop) => !stop.engineOff && OUTSIDE_WORK.includes(stop.reason ?? ''))
  const sum = (list: Stop[]) =>
    list.reduce<number | null>((total, stop) => {
      const minutes = length(stop)
      return total === null || minutes === null ? null : total + minutes
    }, 0)
  const offMin = sum(off)
  const idleMin = sum(idle)
  if (offMin === null || idleMin === null) return null
  const fuel_min = run.gross_min - offMin
  const field_min = fuel_min - idleMin
  if (fuel_min <= 0 || field_min <= 0) return null
  const fuelCells = [...run.cells, ...off.flatMap((stop) => stop.cells)]
  const fieldCells = [...fuelCells, ...idle.flatMap((stop) => stop.cells)]
  return {
    gross_min: run.gross_min,
    fuel_min,
    field_min,
    stopsOutOfFuel: off.length,
    stopsOutOfField: off.length + idle.length,
    fuelCells,
    fieldCells,
    step_min: fieldCells.every((cell) => typeof readings[cell] !== 'string' || /:\d\d:\d\d$/.test(readings[cell])) ? 1 / 60 : 1,
  }
}

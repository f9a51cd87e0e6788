/** What the time was spent on: passes, turns, stops. */
import { above, outside } from './compare.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure } from './text.ts'

const q38: Rule = {
  id: 'Q38',
  version: 1,
  name: 'time balance',
  severity: ['doubt'],
  cells: ['pass_count', 'speed_t_s', 'turn_time_s', 'stop_from', 'stop_to'],
  why: 'Passes, turns and stops make up the time; a gap is a missing stop or a wrong speed [P].',
  check: (ctx) => {
    const turns_s = ctx.number('turn_time_s')
    const passes = ctx.number('pass_count')
    const speed = ctx.results.speed_km_h.value
    const { pass_m } = ctx.plot
    if (!ctx.times || turns_s === null || passes === null || speed === null || pass_m === null) return []
    const total = ctx.times.gross_min
    const stopped = ctx.stops.reduce((sum, s) => sum + (s.from_min !== null && s.to_min !== null ? s.to_min - s.from_min : 0), 0)
    const told = (passes * pass_m * 0.06) / speed + turns_s / 60 + stopped
    if (!above((100 * Math.abs(total - told)) / total, ctx.limit('time_balance_pct'))) return []
    return [
      found(
        'doubt',
        ['t_start', 't_end', 'turn_time_s', ...ctx.stops.flatMap((s) => s.cells)],
        `${figure(total, 0)} min by the clock, ${figure(told, 0)} min by passes, turns and stops: is a stop missing?`,
        { clock_min: total, told_min: told },
      ),
    ]
  },
}

const q39: Rule = {
  id: 'Q39',
  version: 1,
  name: 'turns and passes',
  severity: ['doubt'],
  cells: ['turn_count', 'turn_time_s', 'pass_count'],
  why: 'One turn fewer than passes, give or take one [P].',
  check: (ctx) => {
    const [turns, passes, total] = [ctx.number('turn_count'), ctx.number('pass_count'), ctx.number('turn_time_s')]
    if (turns === null) return []
    const out: Found[] = []
    if (passes !== null && (turns < passes - 2 || turns > passes + 1))
      out.push(
        found('doubt', ['turn_count', 'pass_count'], `${turns} turns for ${passes} passes: ${passes - 1} were to be expected.`, {
          turns,
          passes,
        }),
      )
    if (total !== null && turns > 0) {
      const each = total / turns
      if (outside(each, ctx.limit('turn_low_s'), ctx.limit('turn_high_s')))
        out.push(
          found(
            'doubt',
            ['turn_time_s', 'turn_count'],
            `A turn took ${figure(each, 2)} s on average; ${ctx.limit('turn_low_s')} to ${ctx.limit('turn_high_s')} s is usual.`,
            { each_s: each },
          ),
        )
    }
    return out
  },
}

const q40: Rule = {
  id: 'Q40',
  version: 1,
  name: 'idling in the fuel',
  severity: ['doubt'],
  cells: ['stop_from', 'stop_to', 'stop_engine_off', 'stop_reason'],
  why: 'An engine left running through a speech burns fuel that is no work [P].',
  check: (ctx) =>
    ctx.stops
      .filter((stop) => !stop.engineOff && (stop.reason === 'speech' || stop.reason === 'breakdown'))
      .map((stop) =>
        found(
          'doubt',
          [...stop.cells, `stop_reason[${stop.n}]`],
          `Stop ${stop.n} (${stop.reason}) with the engine running: its fuel is in the figure.`,
          { reason: stop.reason ?? '' },
        ),
      ),
}

/** Shorter runs burn too little, longer ones are a misread clock [P]. */
const l09: Rule = {
  id: 'L09',
  version: 1,
  name: 'length of the run',
  severity: ['doubt'],
  cells: ['t_start', 't_end'],
  why: 'A run of 20 to 240 min says something about a field [P].',
  check: (ctx) => {
    const minutes = ctx.times?.gross_min
    const [low, high] = [ctx.limit('run_low_min'), ctx.limit('run_high_min')]
    if (minutes === undefined || !outside(minutes, low, high)) return []
    return [
      found('doubt', ['t_start', 't_end'], `The run took ${figure(minutes, 0)} min; ${low} to ${high} min are usual.`, {
        minutes,
        low_min: low,
        high_min: high,
      }),
    ]
  },
}

export const workTimeRules: readonly Rule[] = [q38, q39, q40, l09]

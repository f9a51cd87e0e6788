/** The tractor's own clock against the watch, and against its last reading. */
import { above, outside } from './compare.ts'
import { found, type Rule } from './rule.ts'
import { figure } from './text.ts'

const CELLS = ['hour_meter_start', 'hour_meter_end']

const q18: Rule = {
  id: 'Q18',
  version: 1,
  name: 'hour meter and clock',
  severity: ['stop', 'doubt'],
  cells: [...CELLS, 't_start', 't_end'],
  why: 'An electronic meter counts hours, a mechanical one turns of the engine; neither runs backwards [P].',
  check: (ctx) => {
    const [start, end] = [ctx.number('hour_meter_start'), ctx.number('hour_meter_end')]
    if (start === null || end === null) return []
    // Meters show tenths: what lies below is the machine's arithmetic.
    const run = Number((end - start).toFixed(6))
    const compared = { hour_meter_start: start, hour_meter_end: end }
    if (run < 0)
      return [
        found('stop', CELLS, `Hour meter ${start} h at the start, ${end} h at the end: it does not run backwards.`, compared),
      ]
    if (!ctx.times) return []
    const clock = ctx.times.fuel_min / 60
    const mechanical = ctx.facts.hourMeterKind === 'mechanical'
    const differs = mechanical
      ? outside(run / clock, ctx.limit('hour_meter_mechanical_low'), ctx.limit('hour_meter_mechanical_high'))
      : above(Math.abs(run - clock), ctx.limit('hour_meter_base_h') + ctx.limit('hour_meter_share') * clock)
    if (!differs) return []
    return [
      found(
        'doubt',
        [...CELLS, ...ctx.times.fuelCells],
        `Hour meter ${figure(run, 1)} h, clock ${figure(clock)} h: copied or misread?`,
        { ...compared, meter_h: run, clock_h: clock },
      ),
    ]
  },
}

const q19: Rule = {
  id: 'Q19',
  version: 1,
  name: 'hour meter and last reading',
  severity: ['doubt'],
  cells: ['hour_meter_start', 'tractor_id'],
  why: 'Less than at an earlier date is another tractor, or a misread digit [P].',
  check: (ctx) => {
    const start = ctx.number('hour_meter_start')
    const last = ctx.facts.lastHourMeter_h ?? null
    if (start === null || last === null || start >= last) return []
    const tractor = ctx.readings.tractor_id === undefined ? [] : ['tractor_id']
    return [
      found(
        'doubt',
        ['hour_meter_start', ...tractor],
        `Hour meter ${start} h; this tractor stood at ${last} h before: another tractor?`,
        { hour_meter_start: start, last_h: last },
      ),
    ]
  },
}

export const hourMeterRules: readonly Rule[] = [q18, q19]

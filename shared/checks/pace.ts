/** Speed, slip and engine speed. */

import type { Operation } from '../trial/facts.ts'
import { variation_pct } from '../trial/stats.ts'
import { above, below, outside } from './compare.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure, rough } from './text.ts'

const q20: Rule = {
  id: 'Q20',
  version: 1,
  name: 'slip range',
  severity: ['stop', 'doubt', 'note'],
  cells: ['dist_load_m', 'dist_noload_m', 'rev_n'],
  why: 'No negative slip under pull; 8 to 15 % is the usual good band (operator manuals), beyond it the wheel limit of Code 2 [M].',
  check: (ctx) => {
    const slip = ctx.results.slip_pct
    if (slip.value === null) return []
    const s = slip.value
    const told = (severity: 'stop' | 'doubt' | 'note', why: string) => [
      found(severity, slip.from, `Slip ${figure(s, 1)} %: ${why}`, { slip_pct: s }),
    ]
    const most = ctx.limit(ctx.facts.drive === '4WD' ? 'slip_doubt_4wd_pct' : 'slip_doubt_2wd_pct')
    if (below(s, ctx.limit('slip_stop_low_pct'))) return told('stop', 'a wheel under pull cannot gain way. Ways changed over?')
    if (above(s, ctx.limit('slip_stop_high_pct')))
      return told('stop', `over ${ctx.limit('slip_stop_high_pct')} % no work is done. A way misread?`)
    if (below(s, 0)) return told('doubt', 'under pull the way is shorter, not longer.')
    if (above(s, most)) return told('doubt', `over ${most} % is much for ${ctx.facts.drive ?? 'any drive'}.`)
    if (below(s, ctx.limit('slip_note_low_pct'))) return told('note', 'hardly any pull.')
    return above(s, ctx.limit('slip_note_high_pct'))
      ? told('note', `over ${ctx.limit('slip_note_high_pct')} % is more than good work asks for.`)
      : []
  },
}

const meanOf = (values: number[]) => values.reduce((sum, x) => sum + x, 0) / values.length

const q22: Rule = {
  id: 'Q22',
  version: 1,
  name: 'way of a wheel turn',
  severity: ['doubt'],
  cells: ['rev_n', 'dist_noload_m'],
  why: 'Without load a turn is the rolling circumference, or the turns were miscounted [P].',
  check: (ctx) => {
    const [turns, round] = [ctx.number('rev_n'), ctx.facts.rollingCircumference_m ?? null]
    const ways = ctx.all('dist_noload_m')
    if (turns === null || turns <= 0 || round === null || ways.length === 0) return []
    const each = meanOf(ways.map((w) => w.value)) / turns
    if (!above((100 * Math.abs(each - round)) / round, ctx.limit('roll_match_pct'))) return []
    return [
      found(
        'doubt',
        ['rev_n', ...ways.map((w) => w.key)],
        `${figure(each)} m a turn without load, ${figure(round)} m by the tyre: are the turns miscounted?`,
        { way_m: each, circumference_m: round },
      ),
    ]
  },
}

const SPEED_CELLS = ['speed_dist_m', 'speed_t_s']

const q24: Rule = {
  id: 'Q24',
  version: 1,
  name: 'speed and gear',
  severity: ['doubt'],
  cells: [...SPEED_CELLS, 'gear_range', 'gear', 'rpm_load'],
  why: 'Gear, engine speed and slip give the speed; another is a wrong gear, rpm or distance [P].',
  check: (ctx) => {
    const [speed, rpm] = [ctx.results.speed_km_h, ctx.number('rpm_load')]
    const { gearSpeed_km_h: geared, ratedRpm } = ctx.facts
    if (speed.value === null || rpm === null || !geared || !ratedRpm) return []
    const free = (geared * rpm) / ratedRpm
    const expected = free * (1 - (ctx.results.slip_pct.value ?? 0) / 100)
    const off = Math.abs(speed.value - expected) / expected
    if (!above(off, ctx.limit('gear_speed_pct') / 100) && !above(speed.value, free * ctx.limit('no_slip_speed'))) return []
    const cells = [...speed.from, 'rpm_load', ...['gear_range', 'gear'].filter((key) => ctx.readings[key] !== undefined)]
    return [
      found('doubt', cells, `${figure(speed.value)} km/h by the pegs, ${figure(expected)} km/h by gear, engine speed and slip.`, {
        speed_km_h: speed.value,
        expected_km_h: expected,
        no_slip_km_h: free,
      }),
    ]
  },
}

/** Typical speeds, km/h: D497 table 3, from memory. Operations not in it have no band. */
const TYPICAL_KMH: Partial<Record<Operation, readonly [number, number]>> = {
  plough: [5, 10],
  disc: [5.5, 10],
  cultivator: [8, 13],
  rotary_tiller: [2, 7],
  subsoiler: [6.5, 10.5],
}

const q25: Rule = {
  id: 'Q25',
  version: 1,
  name: 'speed band',
  severity: ['doubt', 'note'],
  cells: [...SPEED_CELLS, 'work_kind'],
  why: 'Field speeds by tool (D497 table 3, from memory); transport has those of a tractor on the road [P].',
  check: (ctx) => {
    const { value: v, from } = ctx.results.speed_km_h
    if (v === null) return []
    const told = (severity: 'doubt' | 'note', low: number, high: number) => [
      found(severity, from, `${figure(v)} km/h; ${figure(low, 1)} to ${figure(high, 1)} km/h is usual.`, {
        speed_km_h: v,
        low_km_h: low,
        high_km_h: high,
      }),
    ]
    const road = ctx.text('work_kind') === 'transport'
    const possible = [ctx.limit('speed_doubt_low_kmh'), ctx.limit(road ? 'road_doubt_high_kmh' : 'speed_doubt_high_kmh')] as const
    if (outside(v, ...possible)) return told('doubt', ...possible)
    const usual = [
      ctx.limit(road ? 'road_low_kmh' : 'speed_low_kmh'),
      ctx.limit(road ? 'road_high_kmh' : 'speed_high_kmh'),
    ] as const
    if (outside(v, ...usual)) return told('note', ...usual)
    if (road) return []
    const typical = ctx.facts.operation ? TYPICAL_KMH[ctx.facts.operation] : undefined
    if (!typical) return []
    const share = ctx.limit('speed_band_share')
    const [low, high] = [typical[0] * (1 - share), typical[1] * (1 + share)]
    return outside(v, low, high) ? told('note', low, high) : []
  },
}

const q26: Rule = {
  id: 'Q26',
  version: 1,
  name: 'spread of the timed runs',
  severity: ['doubt', 'note'],
  cells: ['speed_t_s'],
  why: 'A slope, or a late thumb [P].',
  check: (ctx) => {
    const runs = ctx.all('speed_t_s')
    if (runs.length === 0) return []
    const keys = runs.map((r) => r.key)
    const times = runs.map((r) => r.value)
    const cv = variation_pct(times)
    const out: Found[] = []
    if (cv !== null && above(cv, ctx.limit('timed_cv_note_pct'))) {
      const severity = above(cv, ctx.limit('timed_cv_doubt_pct')) ? 'doubt' : 'note'
      out.push(found(severity, keys, `The times ${times.join(', ')} s lie ${rough(cv)} % apart.`, { cv_pct: cv }))
    }
    if (runs.length < 3)
      out.push(
        found('note', keys, `${runs.length} timed ${runs.length === 1 ? 'run' : 'runs'}; 3 are wanted.`, { runs: runs.length }),
      )
    return out
  },
}

const q53: Rule = {
  id: 'Q53',
  version: 1,
  name: 'engine speeds',
  severity: ['doubt'],
  cells: ['rpm_noload', 'rpm_load', 'pto_rpm'],
  why: 'Load pulls the engine down, a little [P].',
  check: (ctx) => {
    const [free, loaded, pto] = [ctx.number('rpm_noload'), ctx.number('rpm_load'), ctx.number('pto_rpm')]
    const out: Found[] = []
    if (free !== null && loaded !== null && free > 0) {
      const droop = (100 * (free - loaded)) / free
      const compared = { rpm_noload: free, rpm_load: loaded }
      if (droop < 0)
        out.push(
          found(
            'doubt',
            ['rpm_noload', 'rpm_load'],
            `${loaded} r/min in work, ${free} r/min without load: changed over?`,
            compared,
          ),
        )
      else if (above(droop, ctx.limit('droop_pct')))
        out.push(
          found(
            'doubt',
            ['rpm_noload', 'rpm_load'],
            `${free} r/min fell to ${loaded} r/min in work, by ${figure(droop, 1)} %: misread?`,
            compared,
          ),
        )
    }
    const off = pto === null ? 0 : Math.min(Math.abs(pto - 540) / 540, Math.abs(pto - 1000) / 1000)
    if (pto !== null && above(100 * off, ctx.limit('pto_rpm_pct')))
      out.push(found('doubt', ['pto_rpm'], `PTO ${pto} r/min is neither 540 nor 1000.`, { pto_rpm: pto }))
    return out
  },
}

export const paceRules: readonly Rule[] = [q20, q22, q24, q25, q26, q53]

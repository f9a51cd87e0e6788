/** The fuel rate against what the engine and the work can ask for. */
import { ptoPowerOf } from '../trial/facts.ts'
import { USUAL_L_HA } from '../trial/usual-fuel.ts'
import { above, below, outside } from './compare.ts'
import type { CheckContext } from './context.ts'
import { found, type Rule } from './rule.ts'
import { figure } from './text.ts'

const BALANCE = ['jar_start_ml', 'topup_ml', 'jar_end_ml']

const ptoPower = (ctx: CheckContext) => ptoPowerOf(ctx.facts, ctx.limit('pto_share_of_rated'))

const RATE = [...BALANCE, 't_start', 't_end']

const q29: Rule = {
  id: 'Q29',
  version: 1,
  name: 'fuel rate too high',
  severity: ['stop', 'doubt'],
  cells: [...RATE, 'pump_return_in_jar', 'leakoff_return_in_jar'],
  why: 'More than the engine can burn at full load: usually a return line that is not in the jar (D497.7, D497.4).',
  check: (ctx) => {
    const [rate, power] = [ctx.results.l_per_h.value, ptoPower(ctx)]
    if (rate === null || power === null) return []
    const most = ctx.limit('fuel_cap_l_kwh') * power
    if (!above(rate, most)) return []
    const severity = above(rate, ctx.limit('fuel_cap_stop_l_kwh') * power) ? 'stop' : 'doubt'
    const returns = ['pump_return_in_jar', 'leakoff_return_in_jar'].filter((key) => ctx.readings[key] !== undefined)
    return [
      found(
        severity,
        [...ctx.results.l_per_h.from, ...returns],
        `${figure(rate, 1)} L/h; ${figure(power, 1)} kW at the PTO burns ${figure(most, 1)} L/h at most: is a return line still on the tank?`,
        { l_per_h: rate, most_l_per_h: most, pto_kw: power },
      ),
    ]
  },
}

const q30: Rule = {
  id: 'Q30',
  version: 1,
  name: 'fuel rate too low',
  severity: ['doubt'],
  cells: [...RATE, 'tank_cock_shut'],
  why: 'Less than near idle: the tank fed the engine as well, or the time is wrong [P].',
  check: (ctx) => {
    const [rate, power] = [ctx.results.l_per_h.value, ptoPower(ctx)]
    if (rate === null || power === null) return []
    const least = ctx.limit('fuel_floor_l_kwh') * power
    if (!below(rate, least)) return []
    const cock = ctx.readings.tank_cock_shut === undefined ? [] : ['tank_cock_shut']
    return [
      found(
        'doubt',
        [...ctx.results.l_per_h.from, ...cock],
        `${figure(rate, 2)} L/h is near idle for ${figure(power, 1)} kW (${figure(least, 2)} L/h): was the tank cock open?`,
        { l_per_h: rate, least_l_per_h: least, pto_kw: power },
      ),
    ]
  },
}

const q31: Rule = {
  id: 'Q31',
  version: 1,
  name: 'fuel and load model',
  severity: ['note'],
  cells: [...RATE, 'soil_class', 'rpm_load'],
  why: 'Far from what draft and throttle would burn; the model is rough (D497.7 [F], draft bands [M]).',
  check: (ctx) => {
    const [rate, expected] = [ctx.results.l_per_h, ctx.results.expected_l_per_h.value]
    if (rate.value === null || expected === null) return []
    if (!above((100 * Math.abs(rate.value - expected)) / expected, ctx.limit('load_model_pct'))) return []
    return [
      found(
        'note',
        rate.from,
        `${figure(rate.value, 1)} L/h measured, about ${figure(expected, 1)} L/h by draft and throttle; the model is rough.`,
        { l_per_h: rate.value, model_l_per_h: expected },
      ),
    ]
  },
}

const q32: Rule = {
  id: 'Q32',
  version: 1,
  name: 'fuel per hectare out of band',
  severity: ['doubt', 'note'],
  cells: [...BALANCE, 'side_ab_m', 'side_bc_m'],
  why: 'About a third either way of the usual for the operation (Iowa State A3-27).',
  check: (ctx) => {
    const value = ctx.results.l_per_ha.value
    const { operation, usual_l_per_ha } = ctx.facts
    const usual = usual_l_per_ha ?? (operation ? USUAL_L_HA[operation] : null) ?? null
    if (value === null || usual === null) return []
    const ratio = value / usual
    const compared = { l_per_ha: value, usual_l_per_ha: usual }
    const told = `${figure(value, 1)} L/ha; ${figure(usual, 1)} L/ha is usual for this operation.`
    if (outside(ratio, ctx.limit('band_doubt_low'), ctx.limit('band_doubt_high')))
      return [found('doubt', ctx.results.l_per_ha.from, told, compared)]
    if (outside(ratio, ctx.limit('band_note_low'), ctx.limit('band_note_high')))
      return [found('note', ctx.results.l_per_ha.from, told, compared)]
    return []
  },
}

export const fuelLoadRules: readonly Rule[] = [q29, q30, q31, q32]

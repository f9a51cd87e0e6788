/** Fuel figures against the engine and the trade. */

import { standardUncertainty } from '../trial/measure.ts'
import { above, below, outside } from './compare.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure, rough } from './text.ts'

const BALANCE = ['jar_start_ml', 'topup_ml', 'jar_end_ml']

const q09: Rule = {
  id: 'Q09',
  version: 1,
  name: 'fuel not positive',
  severity: ['stop'],
  cells: BALANCE,
  why: 'No engine makes fuel: levels changed over, or a top-up not written.',
  check: (ctx) => {
    if (!ctx.fuel.known || ctx.fuel.value > 0) return []
    const [start, end] = [ctx.number('jar_start_ml') ?? 0, ctx.number('jar_end_ml') ?? 0]
    const swapped = ctx.fuel.value + 2 * (end - start)
    const advice = swapped > 0 ? `Changed over, the two jar levels give ${swapped} mL.` : 'Is a top-up missing?'
    return [
      found('stop', ctx.fuelCells, `The jar gives ${ctx.fuel.value} mL used. ${advice}`, {
        fuel_ml: ctx.fuel.value,
        swapped_ml: swapped,
      }),
    ]
  },
}

const q11: Rule = {
  id: 'Q11',
  version: 1,
  name: 'run too short',
  severity: ['stop', 'doubt'],
  cells: BALANCE,
  why: 'Too little fuel burned for the marks of the jar to say anything (JCGM 100).',
  check: (ctx) => {
    const { fuel } = ctx
    if (!fuel.known || fuel.value <= 0) return []
    const U_pct = (200 * standardUncertainty(fuel.parts)) / fuel.value
    if (!above(U_pct, ctx.limit('fuel_u_doubt_pct'))) return []
    const severity = above(U_pct, ctx.limit('fuel_u_stop_pct')) ? 'stop' : 'doubt'
    return [
      found(severity, ctx.fuelCells, `${fuel.value} mL burned is known to ± ${rough(U_pct)} %: too little for this jar.`, {
        fuel_ml: fuel.value,
        U_pct,
      }),
    ]
  },
}

/** Rated PTO power, kW: from a test report, else a share of the engine's. */
function ptoPower(ctx: CheckContext): number | null {
  const { ptoPower_kw, ratedPower_kw } = ctx.facts
  return ptoPower_kw ?? (ratedPower_kw == null ? null : ctx.limit('pto_share_of_rated') * ratedPower_kw)
}

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

/** L/ha by operation. Plough: Missouri G1208, 1.68 gal/acre; disc, cultivator, harrow: the same table; the others [P], middle of a range. */
const USUAL_L_HA = { plough: 15.715, disc: 8.89, cultivator: 5.61, harrow: 3.74, rotary_tiller: 21, subsoiler: 22.5 } as const

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
    const usual = usual_l_per_ha ?? (operation ? USUAL_L_HA[operation] : null)
    if (value === null || usual === null) return []
    const ratio = value / usual
    const compared = { l_per_ha: value, usual_l_per_ha: usual }
    const told = `${figure(value, 1)} L/ha; ${figure(usual, 1)} is usual for this operation.`
    if (outside(ratio, ctx.limit('band_doubt_low'), ctx.limit('band_doubt_high')))
      return [found('doubt', ctx.results.l_per_ha.from, told, compared)]
    if (outside(ratio, ctx.limit('band_note_low'), ctx.limit('band_note_high')))
      return [found('note', ctx.results.l_per_ha.from, told, compared)]
    return []
  },
}

const q47: Rule = {
  id: 'Q47',
  version: 1,
  name: 'density',
  severity: ['stop', 'note'],
  cells: ['density_15'],
  why: 'Diesel lies between; another figure is g/mL for kg/m³, or another fuel (EN 590 pages).',
  check: (ctx) => {
    const rho = ctx.facts.density15_kgm3 ?? null
    if (rho === null) return []
    const compared = { density15_kgm3: rho }
    if (rho < ctx.limit('density_low') || rho > ctx.limit('density_high'))
      return [
        found(
          'stop',
          ['density_15'],
          `Density ${rho} kg/m³ at 15 °C is no diesel: ${rho > 0.7 && rho < 1 ? 'written in g/mL?' : 'misread?'}`,
          compared,
        ),
      ]
    if (rho < ctx.limit('density_note_low') || rho > ctx.limit('density_note_high'))
      return [
        found(
          'note',
          ['density_15'],
          `Density ${rho} kg/m³ at 15 °C; ${ctx.limit('density_note_low')} to ${ctx.limit('density_note_high')} is usual.`,
          compared,
        ),
      ]
    return []
  },
}

const temps = (ctx: CheckContext) =>
  ['fuel_temp_start_c', ...ctx.keys('topup_temp_c'), 'fuel_temp_end_c'].flatMap((key) => {
    const value = ctx.number(key)
    return value === null ? [] : [{ key, value }]
  })

const q48: Rule = {
  id: 'Q48',
  version: 1,
  name: 'fuel temperature',
  severity: ['doubt'],
  cells: ['fuel_temp_start_c', 'fuel_temp_end_c', 'topup_temp_c'],
  why: 'Fuel warms in a run, slowly; hot return fuel is a danger [P].',
  check: (ctx) => {
    const [start, end] = [ctx.number('fuel_temp_start_c'), ctx.number('fuel_temp_end_c')]
    const out: Found[] = []
    if (start !== null && end !== null && (end < start - ctx.limit('temp_fall_c') || end - start > ctx.limit('temp_rise_c'))) {
      out.push(
        found(
          'doubt',
          ['fuel_temp_start_c', 'fuel_temp_end_c'],
          `Fuel ${start} °C at the start, ${end} °C at the end: a misread figure?`,
          { start_c: start, end_c: end },
        ),
      )
    }
    const most = ctx.limit('temp_hot_c')
    for (const { key, value } of temps(ctx)) {
      if (value > most)
        out.push(
          found(
            'doubt',
            [key],
            `${ctx.label(key)} ${value} °C: over ${most} °C stop, let it cool, and look for hot return fuel.`,
            { [key]: value, most_c: most, safety: 'hot fuel' },
          ),
        )
    }
    return out
  },
}

const q49: Rule = {
  id: 'Q49',
  version: 1,
  name: 'fuel temperature missing',
  severity: ['note'],
  cells: ['fuel_temp_start_c', 'fuel_temp_end_c'],
  why: 'Without it the fuel cannot be brought to 15 °C; about 1 % stays open.',
  check: (ctx) => {
    if (temps(ctx).length > 0 || ctx.keys('fuel_temp_start_c').length === 0) return []
    const air = ctx.facts.airTemp_c ?? null
    const time = ctx.times?.gross_min ?? null
    const hot = air !== null && air > ctx.limit('temp_needed_air_c')
    const long = time !== null && time > ctx.limit('temp_needed_min')
    if (!hot && !long) return []
    return [
      found(
        'note',
        ['fuel_temp_start_c', 'fuel_temp_end_c'],
        `No fuel temperature ${hot ? `at ${air} °C in the air` : `in a run of ${figure(time ?? 0, 0)} min`}: about 1 % stays open.`,
        { ...(air === null ? {} : { air_c: air }), ...(time === null ? {} : { minutes: time }) },
      ),
    ]
  },
}

export const fuelRules: readonly Rule[] = [q09, q11, q29, q30, q32, q47, q48, q49]

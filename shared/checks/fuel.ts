/** Fuel figures against the engine and the trade. */

import { standardUncertainty } from '../trial/measure.ts'
import { above } from './compare.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure, rough, valued } from './text.ts'

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
    const advice = swapped > 0 ? `Changed over, the two jar levels give ${figure(swapped, 0)} mL.` : 'Is a top-up missing?'
    return [
      found('stop', ctx.fuelCells, `The jar gives ${figure(ctx.fuel.value, 0)} mL used. ${advice}`, {
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

const q47: Rule = {
  id: 'Q47',
  version: 1,
  name: 'density',
  severity: ['stop', 'note'],
  cells: ['density_15', 'density_obs', 'density_temp_c'],
  why: 'Diesel lies between; another figure is g/mL for kg/m³, or another fuel (EN 590 pages).',
  check: (ctx) => {
    const { value, from } = ctx.results.density15_kgm3
    const rho = value ?? ctx.facts.density15_kgm3 ?? null
    if (rho === null) return []
    const compared = { density15_kgm3: rho }
    if (rho < ctx.limit('density_low') || rho > ctx.limit('density_high'))
      return [
        found(
          'stop',
          from,
          `Density ${rough(rho, 4)} kg/m³ at 15 °C is no diesel: ${rho > 0.7 && rho < 1 ? 'written in g/mL?' : 'misread?'}`,
          compared,
        ),
      ]
    if (rho < ctx.limit('density_note_low') || rho > ctx.limit('density_note_high'))
      return [
        found(
          'note',
          from,
          `Density ${rough(rho, 4)} kg/m³ at 15 °C; ${ctx.limit('density_note_low')} to ${ctx.limit('density_note_high')} kg/m³ is usual.`,
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
            `${valued(ctx.label(key), `${value} °C`)}: over ${most} °C stop, let it cool, and look for hot return fuel.`,
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

export const fuelRules: readonly Rule[] = [q09, q11, q47, q48, q49]

/** Readings outside what their instrument shows, or what is usual. Cells with a rule of their own are left to it. */
import { isUsable } from '../trial/readings.ts'
import { stemOf } from './cells.ts'
import type { CheckContext } from './context.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure, valued } from './text.ts'

/** Jar and jug (Q04, Q07), tyres (Q28): their limits come from registers. */
const OWN_RULE = [
  'jar_start_ml',
  'jar_end_ml',
  'topup_ml',
  'tyre_p_fl',
  'tyre_p_fr',
  'tyre_p_rl',
  'tyre_p_rr',
  'fuel_used_written_ml',
  'l_per_ha_written',
  'area_written',
  'depth_mean_written_cm',
  'width_mean_written_m',
]
/** Usual values asked for by the tool or by the fuel rules. */
const OWN_BAND = [...OWN_RULE, 'depth_cm', 'width_m', 'speed_dist_m']

function outside(
  ctx: CheckContext,
  skip: readonly string[],
  limits: 'hard' | 'plausible',
  tell: (key: string, value: number, low: number, high: number) => Found,
): Found[] {
  return Object.keys(ctx.readings).flatMap((key) => {
    const value = ctx.number(key)
    const range = ctx.cell(key)[limits]
    // A nought where nothing can be nought is told by Q56.
    if (value === null || !range || skip.includes(stemOf(key).stem) || (value === 0 && (ctx.cell(key).hard?.[0] ?? 0) > 0))
      return []
    return value < range[0] || value > range[1] ? [tell(key, value, range[0], range[1])] : []
  })
}

const said = (ctx: CheckContext, key: string, value: number) => {
  const { unit } = ctx.cell(key)
  return valued(ctx.label(key), `${value}${unit ? ` ${unit}` : ''}`)
}
const unitOf = (ctx: CheckContext, key: string) => {
  const { unit } = ctx.cell(key)
  return unit ? ` ${unit}` : ''
}

const l01: Rule = {
  id: 'L01',
  version: 1,
  name: 'impossible reading',
  severity: ['stop'],
  cells: [],
  why: 'Outside what the instrument shows (table of readings).',
  check: (ctx) =>
    outside(ctx, OWN_RULE, 'hard', (key, value, low, high) =>
      found('stop', [key], `${said(ctx, key, value)} cannot be: ${figure(low)} to ${high}${unitOf(ctx, key)}.`, {
        [key]: value,
        low,
        high,
      }),
    ),
}

const l02: Rule = {
  id: 'L02',
  version: 1,
  name: 'unlikely reading',
  severity: ['doubt'],
  cells: [],
  why: 'Outside what is usual (table of readings, [P]).',
  check: (ctx) => {
    const impossible = new Set(l01.check(ctx).flatMap((f) => f.cells))
    return outside(ctx, OWN_BAND, 'plausible', (key, value, low, high) =>
      found('doubt', [key], `${said(ctx, key, value)}; ${figure(low)} to ${high}${unitOf(ctx, key)} is usual.`, {
        [key]: value,
        low,
        high,
      }),
    ).filter((f) => !f.cells.some((cell) => impossible.has(cell)))
  },
}

/** Cells that hold a number: they have a unit, decimals or limits. */
const isNumeric = (ctx: CheckContext, key: string) => {
  const { unit, decimals, hard } = ctx.cell(key)
  return unit !== undefined || decimals !== undefined || hard !== undefined || /^tyre_p_.[lr]$/.test(key)
}

const l07: Rule = {
  id: 'L07',
  version: 1,
  name: 'no number',
  severity: ['stop'],
  cells: [],
  why: 'Words, or a number beyond any instrument, where a number belongs.',
  check: (ctx) =>
    Object.entries(ctx.readings).flatMap(([key, value]) => {
      if (value === undefined || value === null || isUsable(value)) return []
      if (typeof value !== 'number' && !isNumeric(ctx, key)) return []
      return [found('stop', [key], `${ctx.label(key)} reads "${value}": a number is needed.`, { [key]: String(value) })]
    }),
}

export const instrumentRules: readonly Rule[] = [l01, l02, l07]

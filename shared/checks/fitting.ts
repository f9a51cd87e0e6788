/** The fitting of the jar and the check list: what was not ticked. */
import type { CheckContext } from './context.ts'
import { dayNumber } from './dates.ts'
import { found, type Rule } from './rule.ts'
import { figure } from './text.ts'

export const CIRCUIT_TICKS = ['supply_in_jar', 'tank_cock_shut', 'pump_return_in_jar', 'leakoff_return_in_jar'] as const
export const AIR_TICKS = ['vent_open', 'leak_check_ok', 'air_bled'] as const
const OTHER_TICKS = [
  'jar_upright_secure',
  'clear_of_exhaust',
  'jar_level_settled',
  'pto_guard_ok',
  'rops_belt_ok',
  'extinguisher_near',
  'audience_briefed',
  'hitch_locked',
  'load_tied',
  'road_fit',
  'driver_licensed',
]

const unticked = (ctx: CheckContext, keys: readonly string[]) => keys.filter((key) => ctx.readings[key] === false)
const told = (ctx: CheckContext, key: string) =>
  found('stop', [key], `${ctx.label(key)} is not ticked: no fuel figure without it.`, { [key]: 'not ticked' })

const q33: Rule = {
  id: 'Q33',
  version: 1,
  name: 'line not switched',
  severity: ['stop'],
  cells: [...CIRCUIT_TICKS],
  why: 'A return to the tank makes the figure too high, a tank that feeds makes it too low.',
  check: (ctx) => unticked(ctx, CIRCUIT_TICKS).map((key) => told(ctx, key)),
}

const q34: Rule = {
  id: 'Q34',
  version: 1,
  name: 'vent, leak or air',
  severity: ['stop'],
  cells: [...AIR_TICKS],
  why: 'A shut vent starves the pump; leaks and air move the level.',
  check: (ctx) => unticked(ctx, AIR_TICKS).map((key) => told(ctx, key)),
}

const l03: Rule = {
  id: 'L03',
  version: 1,
  name: 'check not ticked',
  severity: ['doubt'],
  cells: OTHER_TICKS,
  why: 'A run counts when its check list is signed.',
  check: (ctx) =>
    unticked(ctx, OTHER_TICKS).map((key) =>
      found('doubt', [key], `${ctx.label(key)} is not ticked: was it done?`, { [key]: 'not ticked' }),
    ),
}

const q54: Rule = {
  id: 'Q54',
  version: 1,
  name: 'warm-up',
  severity: ['note'],
  cells: ['warmup_min'],
  why: 'A cold engine burns more [P].',
  check: (ctx) => {
    const minutes = ctx.number('warmup_min')
    const least = ctx.limit('warmup_min')
    return minutes === null || minutes >= least
      ? []
      : [
          found('note', ['warmup_min'], `Warmed up for ${minutes} min; ${least} min are wanted.`, {
            warmup_min: minutes,
            least_min: least,
          }),
        ]
  },
}

/** Whole months from one date to another. */
function monthsBetween(from: string, to: string): number {
  const [a, b] = [from, to].map((date) => date.split('-').map(Number))
  const [y1 = 0, m1 = 0, d1 = 0] = a ?? []
  const [y2 = 0, m2 = 0, d2 = 0] = b ?? []
  return (y2 - y1) * 12 + (m2 - m1) - (d2 < d1 ? 1 : 0)
}

const l04: Rule = {
  id: 'L04',
  version: 1,
  name: 'kit check too old',
  severity: ['doubt'],
  cells: ['kit_id'],
  why: 'Jar and jug are checked against a known litre once a year [P].',
  check: (ctx) => {
    const checked = ctx.facts.kitCheckedOn ?? null
    const day = ctx.text('trial_date') ?? ctx.facts.today ?? null
    if (checked === null || day === null || dayNumber(checked) === null || dayNumber(day) === null) return []
    const months = monthsBetween(checked, day)
    const most = ctx.limit('kit_check_months')
    // Twelve months to the day are still twelve.
    if (months < most || (months === most && checked.slice(8) === day.slice(8))) return []
    return [
      found(
        'doubt',
        ['kit_id'],
        `The kit was last checked ${figure(months, 0)} months before the run, on ${checked}; ${most} months are allowed.`,
        { checked_on: checked, trial_date: day, months },
      ),
    ]
  },
}

export const fittingRules: readonly Rule[] = [q33, q34, l03, q54, l04]

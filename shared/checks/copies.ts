/** This sheet against other sheets. */
import { clockMinutes } from '../trial/clock.ts'
import type { OtherSheet } from '../trial/facts.ts'
import { median, medianDeviation } from '../trial/stats.ts'
import type { CheckContext } from './context.ts'
import { dayNumber } from './dates.ts'
import { type Found, found, type Rule } from './rule.ts'
import { figure } from './text.ts'

const others = (ctx: CheckContext) => ctx.facts.otherSheets ?? []
const DAY_MIN = 24 * 60

/** A run as minutes since 1970, or null. */
function span(date: string | null, start: string | null, end: string | null): [number, number] | null {
  const [day, from, to] = [dayNumber(date), clockMinutes(start), clockMinutes(end)]
  if (day === null || from === null || to === null) return null
  return [day * DAY_MIN + from, day * DAY_MIN + to + (to < from ? DAY_MIN : 0)]
}

const spanOf = (ctx: CheckContext) => span(ctx.text('trial_date') ?? null, ctx.text('t_start'), ctx.text('t_end'))
const spanOfOther = (o: OtherSheet) => span(o.trialDate ?? null, o.start ?? null, o.end ?? null)

/** Measured cells that hold the same number on both sheets. Register numbers and empty cells say nothing. */
function equalCells(ctx: CheckContext, other: OtherSheet): string[] {
  if (!other.readings) return []
  const theirs = other.readings
  return Object.keys(ctx.readings).filter(
    (key) =>
      !key.endsWith('_id') &&
      typeof ctx.readings[key] === 'number' &&
      ctx.readings[key] !== 0 &&
      ctx.readings[key] === theirs[key],
  )
}

/** Cells that differ from run to run; settings such as gear or pressures are often alike on honest sheets. */
const TELLING =
  /^(depth_cm|width_m|speed_t_s|dist_load_m|dist_noload_m|jar_|topup_ml|side_|diag_|hour_meter|fuel_used|depth_mean|width_mean|l_per)/

const q45: Rule = {
  id: 'Q45',
  version: 1,
  name: 'duplicate sheet',
  severity: ['stop', 'doubt'],
  cells: ['t_start', 't_end'],
  why: 'Sent twice, or copied [P].',
  check: (ctx) =>
    others(ctx).flatMap((other): Found[] => {
      const code = other.sheetCode
      if (other.sameCode || (ctx.facts.sheetCode && code === ctx.facts.sheetCode))
        return [found('stop', [], `Sheet ${code} is here already, with other ink: which one stands?`, { sheet: code })]
      const [ours, theirs] = [spanOf(ctx), spanOfOther(other)]
      const overlap = ours && theirs && ours[0] < theirs[1] && theirs[0] < ours[1]
      if (overlap && ctx.facts.tractorSerial && other.tractorSerial === ctx.facts.tractorSerial)
        return [
          found('stop', ['t_start', 't_end'], `Sheet ${code} has the same tractor at work from ${other.start} to ${other.end}.`, {
            sheet: code,
            start: other.start ?? '',
            end: other.end ?? '',
          }),
        ]
      if (ctx.facts.imageHash && other.imageHash === ctx.facts.imageHash)
        return [found('doubt', [], `The same picture came as sheet ${code}.`, { sheet: code })]
      const equal = equalCells(ctx, other).filter((key) => TELLING.test(key))
      if (equal.length < ctx.limit('copied_cells')) return []
      return [
        found('doubt', equal, `${equal.length} measured cells equal those of sheet ${code}: copied?`, {
          sheet: code,
          equal: equal.length,
        }),
      ]
    }),
}

const q46: Rule = {
  id: 'Q46',
  version: 1,
  name: 'impossible journey',
  severity: ['doubt'],
  cells: ['trial_date', 't_start', 't_end'],
  why: 'One person or tractor cannot be in two places so soon: a wrong date or number [P].',
  check: (ctx) =>
    others(ctx).flatMap((other) => {
      const [ours, theirs] = [spanOf(ctx), spanOfOther(other)]
      const same =
        (other.demonstratorId != null && other.demonstratorId === ctx.number('demonstrator_id')) ||
        (other.tractorSerial != null && other.tractorSerial === ctx.facts.tractorSerial)
      if (!ours || !theirs || !same || other.distance_km == null) return []
      const between_h = Math.max(ours[0] - theirs[1], theirs[0] - ours[1]) / 60
      const most = ctx.limit('travel_kmh')
      if (between_h > 0 && other.distance_km / between_h <= most) return []
      if (other.distance_km < 1) return []
      return [
        found(
          'doubt',
          ['trial_date', 't_start', 't_end'],
          `Sheet ${other.sheetCode} is ${figure(other.distance_km, 0)} km away, ${between_h > 0 ? `${figure(between_h, 1)} h apart` : 'at the same time'}: a wrong date or number?`,
          { sheet: other.sheetCode, distance_km: other.distance_km, between_h },
        ),
      ]
    }),
}

const q52: Rule = {
  id: 'Q52',
  version: 1,
  name: 'far from its like',
  severity: ['doubt'],
  cells: ['jar_start_ml', 'jar_end_ml', 'side_ab_m', 'side_bc_m'],
  why: 'Robust z over 3.5 among runs of the same tractor, implement, gear and soil (Iglewicz and Hoaglin [M]).',
  check: (ctx) => {
    const { value, from } = ctx.results.l_per_ha
    const all = value === null ? [] : [...(ctx.facts.peers_l_per_ha ?? []), value]
    if (value === null || all.length < 5) return []
    const [middle, deviation] = [median(all), medianDeviation(all)]
    if (deviation === 0) return []
    const z = (0.6745 * (value - middle)) / deviation
    if (Math.abs(z) <= ctx.limit('robust_z')) return []
    return [
      found('doubt', from, `${figure(value, 1)} L/ha; the middle of ${all.length} such runs is ${figure(middle, 1)}.`, {
        l_per_ha: value,
        median_l_per_ha: middle,
        z,
      }),
    ]
  },
}

export const copyRules: readonly Rule[] = [q45, q46, q52]

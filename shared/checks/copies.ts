/** This sheet against other sheets. */
import { clockMinutes } from '../trial/clock.ts'
import type { OtherSheet } from '../trial/facts.ts'
import { grubbsCritical, grubbsDistance, robustZ } from '../trial/outliers.ts'
import { mean, median } from '../trial/stats.ts'
import { above } from './compare.ts'
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

/** Cells that differ from run to run. Settings are alike on honest sheets, and so are the sides of a plot worked again. */
const TELLING =
  /^(depth_cm|width_m|speed_t_s|dist_load_m|dist_noload_m|jar_|topup_ml|hour_meter|fuel_used|depth_mean|width_mean|l_per)/

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

/** This run among earlier ones with the same tractor, implement, gear and soil. */
function amongPeers(ctx: CheckContext, least: number): { value: number; all: number[]; from: string[] } | null {
  const { value, from } = ctx.results.l_per_ha
  const peers = ctx.facts.peers_l_per_ha ?? []
  return value === null || peers.length + 1 < least ? null : { value, all: [...peers, value], from }
}

const q51: Rule = {
  id: 'Q51',
  version: 1,
  name: 'outlier by Grubbs',
  severity: ['doubt'],
  cells: ['jar_start_ml', 'jar_end_ml', 'side_ab_m', 'side_bc_m'],
  why: 'Further from the mean of its like than chance allows at 1 % (NIST e-Handbook 1.3.5.17.1).',
  check: (ctx) => {
    const run = amongPeers(ctx, 6)
    const G = run === null ? null : grubbsDistance(run.value, run.all)
    if (run === null || G === null) return []
    const most = grubbsCritical(run.all.length, ctx.limit('grubbs_alpha'))
    if (!above(G, most)) return []
    return [
      found(
        'doubt',
        run.from,
        `${figure(run.value, 1)} L/ha; the mean of ${run.all.length} such runs is ${figure(mean(run.all), 1)} L/ha, ${figure(G)} deviations away where ${figure(most)} are allowed.`,
        { l_per_ha: run.value, grubbs: G, critical: most },
      ),
    ]
  },
}

const q52: Rule = {
  id: 'Q52',
  version: 1,
  name: 'outlier by the median',
  severity: ['doubt'],
  cells: ['jar_start_ml', 'jar_end_ml', 'side_ab_m', 'side_bc_m'],
  why: 'Far from the middle of its like, though two wild ones hide each other from a mean (Iglewicz and Hoaglin [M]).',
  check: (ctx) => {
    const run = amongPeers(ctx, 5)
    const z = run === null ? null : robustZ(run.value, run.all)
    if (run === null || z === null || !above(Math.abs(z), ctx.limit('robust_z'))) return []
    return [
      found(
        'doubt',
        run.from,
        `${figure(run.value, 1)} L/ha; the middle of ${run.all.length} such runs is ${figure(median(run.all), 1)} L/ha.`,
        { l_per_ha: run.value, median_l_per_ha: median(run.all), z },
      ),
    ]
  },
}

export const copyRules: readonly Rule[] = [q45, q46, q51, q52]

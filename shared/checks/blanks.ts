/** What is not on the paper, or not fully. */
import { sizeOfLandUnit } from '../trial/land-units.ts'
import { stemOf } from './cells.ts'
import type { Boxes, CheckContext } from './context.ts'
import { AIR_TICKS, CIRCUIT_TICKS } from './fitting.ts'
import type { LimitName } from './limits.ts'
import { type Found, found, type Rule, type Severity } from './rule.ts'
import { inside, listed, numbersListed } from './text.ts'

/** Without these there is no result, or no knowing which trial it is. */
const STOPPING = new Set<string>([
  'trial_date',
  'jar_start_ml',
  'jar_end_ml',
  't_start',
  't_end',
  'side_ab_m',
  'side_bc_m',
  ...CIRCUIT_TICKS,
  ...AIR_TICKS,
])
const QUAD = ['side_cd_m', 'side_da_m']

const blank = (ctx: CheckContext, key: string) => ctx.readings[key] === null
const filled = (ctx: CheckContext, key: string) => ctx.readings[key] !== null && ctx.readings[key] !== undefined
/** "Depth 2 and 7": cells of one stem told by their numbers; others by their names. */
function names(ctx: CheckContext, keys: readonly string[]): string {
  const stems = new Set(keys.map((key) => stemOf(key).stem))
  const numbers = keys.flatMap((key) => stemOf(key).n ?? [])
  const first = keys[0]
  if (first === undefined || stems.size > 1 || numbers.length < 2)
    return listed(keys.map((key, i) => (i === 0 ? ctx.label(key) : inside(ctx.label(key)))))
  return ctx.label(first).replace(/\d+/, numbersListed(numbers))
}

const told = (ctx: CheckContext, severity: Severity, keys: string[], why: string): Found =>
  found(severity, keys, `${names(ctx, keys)} left blank${why}.`, { blank: keys.length })

/** Cells another rule asks for: signatures and consent, and the units of written numbers. */
const ELSEWHERE = ['sign_', 'consent_', 'area_unit', 'tyre_p_unit']
const MOST: Partial<Record<string, LimitName>> = { depth_cm: 'depths_wanted', width_m: 'widths_wanted' }

/** Blank where the sheet must be filled; repeated cells are told together. */
function mandatory(ctx: CheckContext): Found[] {
  const empty = Object.keys(ctx.readings).filter((key) => {
    const { stem, n } = stemOf(key)
    const most = MOST[stem]
    const wanted = most === undefined || (n ?? 0) <= ctx.limit(most)
    return blank(ctx, key) && wanted && ctx.cell(key).mandatory === true && !ELSEWHERE.some((start) => stem.startsWith(start))
  })
  const stems = [...new Set(empty.map((key) => stemOf(key).stem))]
  return stems.map((stem) => {
    const keys = empty.filter((key) => stemOf(key).stem === stem)
    const stops = STOPPING.has(stem)
    const fuel = stops && (stem.startsWith('jar_') || AIR_TICKS.some((t) => t === stem) || CIRCUIT_TICKS.some((t) => t === stem))
    return told(ctx, stops ? 'stop' : 'doubt', keys, fuel ? ': no fuel figure without it' : '')
  })
}

/** Blank beside a neighbour that makes it necessary. */
function conditional(ctx: CheckContext): Found[] {
  const out: Found[] = []
  for (const key of ctx.keys('topup_ml')) {
    const [t, temp] = [key.replace('_ml', '_t'), key.replace('_ml', '_temp_c')]
    if (blank(ctx, key) && (filled(ctx, t) || filled(ctx, temp)))
      out.push(
        found('stop', [key, t], `${ctx.label(t)} is written, its mL left blank: no fuel figure without them.`, {
          [t]: ctx.text(t) ?? '',
        }),
      )
    if (filled(ctx, key) && blank(ctx, t)) out.push(told(ctx, 'doubt', [t], ` beside ${ctx.number(key)} mL poured`))
  }
  for (const stop of ctx.stops) {
    const ends = [`stop_from[${stop.n}]`, `stop_to[${stop.n}]`]
    const missing = ends.filter((key) => blank(ctx, key))
    if (missing.length > 0)
      out.push(
        found(
          stop.engineOff ? 'stop' : 'doubt',
          [...missing, ...(stop.engineOff ? ['t_start', 't_end'] : [])],
          `${names(ctx, missing)} left blank: how long was the stop?`,
          { stop: stop.n },
        ),
      )
  }
  if (QUAD.some((key) => filled(ctx, key))) {
    const missing = [
      ...QUAD.filter((key) => blank(ctx, key)),
      ...(filled(ctx, 'diag_ac_m') || filled(ctx, 'diag_bd_m') ? [] : ['diag_ac_m'].filter((key) => blank(ctx, key))),
    ]
    if (missing.length > 0) out.push(told(ctx, 'stop', missing, ': four sides need each other and a diagonal'))
  }
  const ways = [...ctx.keys('dist_load_m'), ...ctx.keys('dist_noload_m')]
  const empty = ways.filter((key) => blank(ctx, key))
  if (empty.length > 0 && empty.length < ways.length) out.push(told(ctx, 'doubt', empty, ' beside the other ways'))
  return out
}

/** A nought where nothing can be nought: the limits of the cell begin above it. */
function noughts(ctx: CheckContext): Found[] {
  return Object.keys(ctx.readings).flatMap((key) => {
    if (ctx.readings[key] !== 0) return []
    const least = ctx.cell(key).hard?.[0] ?? 0
    if (stemOf(key).stem === 'topup_ml')
      return [found('doubt', [key], `${ctx.label(key)} is 0 mL: nothing poured, or left out?`, { [key]: 0 })]
    return least > 0 ? [found('stop', [key], `${ctx.label(key)} is 0: blank is not nought.`, { [key]: 0, least })] : []
  })
}

const q56: Rule = {
  id: 'Q56',
  version: 1,
  name: 'blank or nought',
  severity: ['stop', 'doubt'],
  cells: [],
  why: 'Blank is not 0, and 0 is not blank: the sheet goes back, or a person says it is blank on purpose.',
  check: (ctx) => [...mandatory(ctx), ...conditional(ctx), ...noughts(ctx)],
}

/** From the first digit on, every box of a comb is filled: no gap, nothing shifted left, no empty decimal. */
function gapIn(boxes: Boxes): boolean {
  const first = boxes.findIndex((box) => box !== null)
  return first >= 0 && boxes.slice(first).includes(null)
}

const q55: Rule = {
  id: 'Q55',
  version: 1,
  name: 'gap between digits',
  severity: ['doubt'],
  cells: [],
  why: 'Numbers stand right in their boxes, without gaps; else the reader or the writer slipped by a box.',
  check: (ctx) =>
    Object.entries(ctx.boxes)
      .filter(([, boxes]) => gapIn(boxes))
      .map(([key, boxes]) => {
        const seen = boxes.map((box) => box ?? '_').join(' ')
        return found('doubt', [key], `${ctx.label(key)} reads "${seen}": an empty box after a digit.`, { boxes: seen })
      }),
}

const SIGNATURES = ['sign_demonstrator', 'sign_operator', 'sign_farmer']
const CONSENTS = ['consent_trial', 'consent_photo', 'consent_contact']

const q57: Rule = {
  id: 'Q57',
  version: 1,
  name: 'signature or consent missing',
  severity: ['stop'],
  cells: [...SIGNATURES, ...CONSENTS],
  why: 'No sheet is entered without its signatures and an answer to every question of consent; no is an answer.',
  check: (ctx) => {
    const signatures = SIGNATURES.filter((key) => ctx.readings[key] === null || ctx.readings[key] === false)
    const consents = CONSENTS.filter((key) => blank(ctx, key))
    return [
      ...signatures.map((key) =>
        found('stop', [key], `${ctx.label(key)} is missing: the sheet cannot be entered.`, { [key]: 'missing' }),
      ),
      ...consents.map((key) =>
        found('stop', [key], `${ctx.label(key)} is not answered: the sheet cannot be entered.`, { [key]: 'missing' }),
      ),
    ]
  },
}

const UNIT_OF: Record<string, readonly string[]> = {
  area_unit: ['m2', 'ha', 'acre'],
  tyre_p_unit: ['psi', 'kPa', 'bar', 'kgf/cm2'],
}
const NUMBERS_OF: Record<string, readonly string[]> = {
  area_unit: ['area_written'],
  tyre_p_unit: ['tyre_p_fl', 'tyre_p_fr', 'tyre_p_rl', 'tyre_p_rr'],
}

/** A unit of the district, as a person confirmed it. */
const isLocal = (ctx: CheckContext, unit: string) => sizeOfLandUnit(ctx.facts, unit) !== null

const q16: Rule = {
  id: 'Q16',
  version: 1,
  name: 'unit missing',
  severity: ['stop'],
  cells: Object.keys(UNIT_OF),
  why: 'A number without its unit cannot be guessed.',
  check: (ctx) =>
    Object.keys(UNIT_OF).flatMap((unit) => {
      const numbers = (NUMBERS_OF[unit] ?? []).filter((key) => ctx.number(key) !== null)
      const said = ctx.readings[unit]
      const known = typeof said === 'string' && (UNIT_OF[unit]?.includes(said) || (unit === 'area_unit' && isLocal(ctx, said)))
      if (numbers.length === 0 || said === undefined || known) return []
      const text =
        said === null
          ? 'has no tick'
          : `reads "${said}", ${unit === 'area_unit' ? 'not confirmed for this district' : 'no unit of pressure'}`
      return [
        found(
          'stop',
          [unit, ...numbers],
          `${ctx.label(unit)} ${text}: ${listed(numbers.map((key) => String(ctx.number(key))))} of what?`,
          Object.fromEntries(numbers.map((key) => [key, ctx.number(key) ?? ''])),
        ),
      ]
    }),
}

export const blankRules: readonly Rule[] = [q16, q55, q56, q57]

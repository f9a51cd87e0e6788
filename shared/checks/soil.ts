/** Depth, width and soil: what the tool left behind. */

import type { Operation } from '../trial/facts.ts'
import { soilWater_pct, waterOfWetSoil_pct } from '../trial/moisture.ts'
import type { Repeat } from '../trial/readings.ts'
import { median, medianDeviation, variation_pct } from '../trial/stats.ts'
import { above, outside } from './compare.ts'
import type { CheckContext } from './context.ts'
import type { LimitName } from './limits.ts'
import { type Found, found, type Rule, type Severity } from './rule.ts'
import { figure, listed, numbersListed, rough, valued } from './text.ts'

const q23: Rule = {
  id: 'Q23',
  version: 1,
  name: 'width and rated width',
  severity: ['stop', 'doubt'],
  cells: ['width_m'],
  why: 'Overlap, gaps, or feet for metres [P].',
  check: (ctx) => {
    const { value: width, from } = ctx.results.width_mean_m
    const rated = ctx.facts.ratedWidth_m ?? null
    if (width === null || rated === null || rated <= 0) return []
    const ratio = width / rated
    const plough = ctx.facts.operation === 'plough'
    const [low, high] = [
      ctx.limit(plough ? 'plough_width_low' : 'width_low'),
      ctx.limit(plough ? 'plough_width_high' : 'width_high'),
    ]
    if (!outside(ratio, low, high)) return []
    const severity = outside(ratio, ctx.limit('width_stop_low'), ctx.limit('width_stop_high')) ? 'stop' : 'doubt'
    const feet = Math.abs(ratio * 0.3048 - 1) < 0.15 ? ' Feet for metres?' : ''
    return [
      found(
        severity,
        from,
        `Mean width ${figure(width, 3)} m, rated ${figure(rated, 3)} m: ${figure(100 * ratio, 0)} % of it.${feet}`,
        { width_m: width, rated_m: rated },
      ),
    ]
  },
}

const q41: Rule = {
  id: 'Q41',
  version: 1,
  name: 'spread of depth',
  severity: ['doubt', 'note'],
  cells: ['depth_cm'],
  why: 'A slipped digit, or uneven work [P].',
  check: (ctx) => {
    const depths = ctx.all('depth_cm')
    if (depths.length < 2) return []
    const values = depths.map((d) => d.value)
    const cv = variation_pct(values) ?? 0
    const out: Found[] = []
    if (above(cv, ctx.limit('depth_cv_note_pct')))
      out.push(
        found(
          above(cv, ctx.limit('depth_cv_doubt_pct')) ? 'doubt' : 'note',
          depths.map((d) => d.key),
          `The depths spread by ${rough(cv)} % of their mean.`,
          { cv_pct: cv },
        ),
      )
    const [middle, deviation] = [median(values), medianDeviation(values)]
    const wild =
      deviation === 0 ? [] : depths.filter((d) => above(Math.abs(d.value - middle), ctx.limit('depth_wild') * deviation))
    return [
      ...out,
      ...wild.map((d) =>
        found(
          'doubt',
          [d.key],
          `${valued(ctx.label(d.key), `${d.value} cm`)} stands far from the middle, ${figure(middle, 1)} cm.`,
          {
            [d.key]: d.value,
            median_cm: middle,
          },
        ),
      ),
    ]
  },
}

const q42: Rule = {
  id: 'Q42',
  version: 1,
  name: 'depth and tool',
  severity: ['stop', 'doubt'],
  cells: ['depth_cm'],
  why: 'Deeper than tool or rule can reach.',
  check: (ctx) => {
    const reach = ctx.facts.ruleReach_cm ?? ctx.limit('rule_reach_cm')
    const most = ctx.facts.maxDepth_cm ?? Number.POSITIVE_INFINITY
    const depths = ctx.all('depth_cm')
    return [
      ...tooDeep(
        ctx,
        depths.filter((d) => d.value > reach),
        'stop',
        'the rule measures',
        reach,
      ),
      ...tooDeep(
        ctx,
        depths.filter((d) => d.value > most && d.value <= reach),
        'doubt',
        'the tool reaches',
        most,
      ),
    ]
  },
}

/** One sentence for all depths beyond one limit. */
function tooDeep(ctx: CheckContext, depths: readonly Repeat[], severity: Severity, what: string, most: number): Found[] {
  const first = depths[0]
  if (first === undefined) return []
  const deepest = Math.max(...depths.map((d) => d.value))
  const label = ctx.label(first.key).replace(/\d+/, numbersListed(depths.map((d) => d.n)))
  const text = depths.length === 1 ? valued(label, `${first.value} cm`) : `${label}, to ${deepest} cm`
  return [
    found(
      severity,
      depths.map((d) => d.key),
      `${text}: ${what} ${most} cm.`,
      { deepest_cm: deepest, most_cm: most, readings: depths.length },
    ),
  ]
}

/** Working depths, cm, by operation [P]; what does not work the soil has none. */
const USUAL_CM: Readonly<Partial<Record<Operation, readonly [number, number]>>> = {
  harrow: [5, 15],
  cultivator: [5, 15],
  rotary_tiller: [5, 18],
  plough: [12, 30],
  disc: [5, 20],
  subsoiler: [30, 60],
}

const l08: Rule = {
  id: 'L08',
  version: 1,
  name: 'depth of the operation',
  severity: ['doubt'],
  cells: ['depth_cm'],
  why: 'Each tool has its depth [P].',
  check: (ctx) => {
    const { operation } = ctx.facts
    const usual = operation ? USUAL_CM[operation] : undefined
    if (!usual) return []
    const [low, high] = usual
    const off = ctx.all('depth_cm').filter((d) => outside(d.value, low, high))
    if (off.length === 0) return []
    return [
      found(
        'doubt',
        off.map((d) => d.key),
        `${listed(off.map((d) => `${d.value} cm`))} deep; ${low} to ${high} cm is usual for this operation.`,
        { readings: off.length, low_cm: low, high_cm: high },
      ),
    ]
  },
}

const COUNTED: ReadonlyArray<{ stem: string; wanted: LimitName; word: string; one: string }> = [
  { stem: 'depth_cm', wanted: 'depths_wanted', word: 'depths', one: 'depth' },
  { stem: 'width_m', wanted: 'widths_wanted', word: 'widths', one: 'width' },
  { stem: 'dist_load_m', wanted: 'slips_wanted', word: 'ways in work', one: 'way in work' },
  { stem: 'dist_noload_m', wanted: 'slips_wanted', word: 'ways without load', one: 'way without load' },
]

const q43: Rule = {
  id: 'Q43',
  version: 1,
  name: 'too few readings',
  severity: ['doubt', 'note'],
  cells: COUNTED.map((c) => c.stem),
  why: 'A mean of few says little about itself [P].',
  check: (ctx) =>
    COUNTED.flatMap(({ stem, wanted, word, one }) => {
      const has = ctx.all(stem)
      const want = ctx.limit(wanted)
      if (has.length === 0 || has.length >= want) return []
      return [
        found(
          has.length < want / 2 ? 'doubt' : 'note',
          has.map((c) => c.key),
          `${has.length} ${has.length === 1 ? one : word}; ${want} are wanted.`,
          { readings: has.length, wanted: want },
        ),
      ]
    }),
}

const q44: Rule = {
  id: 'Q44',
  version: 2,
  name: 'copied readings',
  severity: ['doubt'],
  cells: ['depth_cm'],
  why: 'No field is that even, and no rule shows one last digit so often: invented, copied or rounded [P].',
  check: (ctx) => [...allEqual(ctx), ...lastDigits(ctx)],
}

function allEqual(ctx: CheckContext): Found[] {
  const depths = ctx.all('depth_cm')
  const first = depths[0]?.value
  if (first === undefined || depths.length < ctx.limit('copied_depths') || depths.some((d) => d.value !== first)) return []
  return [
    found(
      'doubt',
      depths.map((d) => d.key),
      `All ${depths.length} depths are ${first} cm: measured each by itself?`,
      { readings: depths.length, depth_cm: first },
    ),
  ]
}

/** χ² that chance exceeds once in a thousand, by degrees of freedom (tables, from memory): two last digits possible, or ten. */
const CHI_SQUARE_AT_1_IN_1000: Readonly<Record<number, number>> = { 2: 10.828, 10: 27.877 }
const LEAST_POOLED = 30

/** Nearly all written to half centimetres: then two last digits are possible, and a stray tenth says nothing. */
const HALVES = 0.9

/** Last digits of this demonstrator's depths together. */
function lastDigits(ctx: CheckContext): Found[] {
  const own = ctx.all('depth_cm')
  const pooled = [...(ctx.facts.pooledDepths_cm ?? []), ...own.map((d) => d.value)]
  if (own.length === 0 || pooled.length < LEAST_POOLED) return []
  const tenths = pooled.map((depth) => Math.round(10 * depth) % 10)
  const halves = tenths.filter((digit) => digit % 5 === 0)
  const byHalves = halves.length >= HALVES * tenths.length
  const [seen, possible] = byHalves ? [halves, [0, 5]] : [tenths, [0, 1, 2, 3, 4, 5, 6, 7, 8, 9]]
  const expected = seen.length / possible.length
  const counts = possible.map((digit) => seen.filter((t) => t === digit).length)
  const chi = counts.reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0)
  if (!above(chi, CHI_SQUARE_AT_1_IN_1000[possible.length] ?? Number.POSITIVE_INFINITY)) return []
  const most = possible[counts.indexOf(Math.max(...counts))] ?? 0
  return [
    found(
      'doubt',
      own.map((d) => d.key),
      `Of ${pooled.length} depths by this demonstrator ${Math.max(...counts)} end in .${most}: read off the rule, or rounded?`,
      { readings: pooled.length, chi_square: chi },
    ),
  ]
}

const q50: Rule = {
  id: 'Q50',
  version: 1,
  name: 'moisture masses',
  severity: ['stop', 'doubt'],
  cells: ['moist_can_g', 'moist_wet_g', 'moist_dry_g'],
  why: 'Can, dry, wet in this order; water over dry soil (ASTM D2216, ISO 11465).',
  check: (ctx) => ctx.all('moist_can_g').flatMap(({ n }) => moisture(ctx, n)),
}

function moisture(ctx: CheckContext, n: number): Found[] {
  const keys = ['moist_can_g', 'moist_dry_g', 'moist_wet_g'].map((stem) => `${stem}[${n}]`)
  const [can, dry, wet] = keys.map(ctx.number)
  if (can == null || dry == null || wet == null) return []
  const compared = { can_g: can, dry_g: dry, wet_g: wet }
  if (!(can < dry && dry < wet))
    return [found('stop', keys, `Can ${can} g, dry ${dry} g, wet ${wet} g: each must weigh more than the one before.`, compared)]
  const water_pct = soilWater_pct(can, wet, dry)
  const out: Found[] = []
  if (outside(water_pct, ctx.limit('moisture_low_pct'), ctx.limit('moisture_high_pct')))
    out.push(
      found(
        'doubt',
        keys,
        `Soil water ${figure(water_pct, 1)} % of the dry soil; ${ctx.limit('moisture_low_pct')} to ${ctx.limit('moisture_high_pct')} % is usual.`,
        { ...compared, water_pct },
      ),
    )
  const written = ctx.number(`moist_written_pct[${n}]`)
  const onWet = waterOfWetSoil_pct(can, wet, dry)
  if (written !== null && Math.abs(written - onWet) <= 0.1 && Math.abs(written - water_pct) > 0.1)
    out.push(
      found(
        'doubt',
        [`moist_written_pct[${n}]`],
        `Soil water by hand ${written} %, on the dry soil ${figure(water_pct, 1)} %: taken on the wet soil?`,
        { written, computed: water_pct },
      ),
    )
  return out
}

export const soilRules: readonly Rule[] = [q23, q41, q42, q43, q44, q50, l08]

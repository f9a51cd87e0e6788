/** How each sample was photographed, and what is wrong with it. */
import type { Layout } from '../../shared/layouts/layout.ts'
import type { Conditions, Level } from './levels.ts'
import type { Scenario } from './scenario.ts'
import type { Writer } from './writer.ts'

export interface SampleCase {
  case: string
  level: Level
  /** What makes the case worth keeping, for samples/README. */
  why: string
  /** Which draw: another one was taken where a digit of the set could not be told even by a person (a 7 like a 4). */
  draw?: number
  /** Key of its layout; tillage where none is named. */
  layout?: string
  writer?: Partial<Writer>
  adjust?: (drawn: Conditions) => Conditions
  /** Changes what is written. */
  change?: (scenario: Scenario, layout: Layout) => void
}

const calm = (c: Conditions): Conditions => ({ ...c, dirt: null, thumb: false, lost: null, scan: null, spoiled: 0, wrongSum: 0 })
const upright = (c: Conditions, more: Partial<Conditions['shot']> = {}): Conditions['shot'] => {
  const [short, long] = [Math.min(c.shot.width, c.shot.height), Math.max(c.shot.width, c.shot.height)]
  return { ...c.shot, width: short, height: long, roll: 0.02, ...more }
}
const noShadow = (c: Conditions): Conditions['light'] => ({ ...c.light, shadow: 0, glare: 0 })
const spoil =
  (...keys: string[]) =>
  (scenario: Scenario) => {
    scenario.spoiled.push(...keys)
  }

/** Pixels of a sample photo: 6 megapixels keep the folder small. */
const SIDE_PX = [2160, 2880] as const

const sized = (c: Conditions): Conditions => {
  const lying = c.shot.width > c.shot.height
  return { ...c, shot: { ...c.shot, width: lying ? SIDE_PX[1] : SIDE_PX[0], height: lying ? SIDE_PX[0] : SIDE_PX[1] } }
}

const make = (name: string, level: Level, why: string, more: Omit<SampleCase, 'case' | 'level' | 'why'> = {}): SampleCase => ({
  case: name,
  level,
  why,
  ...more,
  adjust: (c) => {
    const base = sized(calm(c))
    const adjusted = more.adjust?.(base) ?? base
    return { ...adjusted, optics: { ...adjusted.optics, jpegQuality: Math.min(80, adjusted.optics.jpegQuality) } }
  },
})

const PEN = { pen: { width_mm: 0.46, strength: 0.96, dry: 0 }, stroke: 'traced', pencil: false } as const

export const SAMPLE_CASES: readonly SampleCase[] = [
  make('golden', 'easy', 'the worked example, written clearly', {
    writer: {
      ...PEN,
      colour: [34, 44, 120],
      slant: -0.06,
      slantSpread: 0.03,
      size: 0.66,
      slips: 0,
      leading: 'blank',
      tick: 'check',
    },
    adjust: (c) => ({ ...c, shot: upright(c, { roll: 0.01 }), ground: 'wood', light: noShadow(c), careful: 1, curl_mm: 1 }),
  }),
  make('careful', 'easy', 'a careful photo of a planned sheet', { adjust: (c) => ({ ...c, shot: upright(c) }) }),
  make('haulage', 'ordinary', 'another layout: a run on the road, on a sheet that nobody planned', {
    layout: 'haulage',
    adjust: (c) => ({ ...c, shot: upright(c) }),
  }),
  make('flat-scan', 'easy', 'an office scan, grey, a little askew', {
    adjust: (c) => ({ ...c, scan: { dpi: 200, grey: true, skew: 0.012, scale: 1, copied: false, contrast: 1, jpegQuality: 78 } }),
  }),
  make('shadow', 'ordinary', 'the shadow of a cab across the page', {
    adjust: (c) => ({ ...c, shot: upright(c), light: { ...noShadow(c), shadow: 0.5, softness: 0.02 } }),
  }),
  make('tilted', 'ordinary', 'taken from the side', {
    adjust: (c) => ({ ...c, shot: upright(c, { pitch: -0.24, yaw: 0.2, roll: 0.07, fill: 0.92 }) }),
  }),
  make('coffee', 'ordinary', 'a ring of coffee over the fuel column', { adjust: (c) => ({ ...c, dirt: 'coffee' }) }),
  make('pencil', 'ordinary', 'written in pencil', {
    writer: { ...PEN, pencil: true, colour: [94, 94, 98], pen: { width_mm: 0.44, strength: 0.8, dry: 0 } },
    adjust: (c) => ({ ...c, shot: upright(c), light: noShadow(c) }),
  }),
  make('crossed-out', 'ordinary', 'two values crossed out, one written again beside', {
    adjust: (c) => ({ ...c, shot: upright(c), light: noShadow(c) }),
    change: spoil('jar_end_ml', 'depth_cm[4]', 'rev_n'),
  }),
  make('wrong-sum', 'ordinary', 'the fuel used by hand is 1000 mL off', {
    adjust: (c) => ({ ...c, shot: upright(c), light: noShadow(c) }),
    change: (s) => {
      const right = Number(s.readings.fuel_used_written_ml)
      s.readings.fuel_used_written_ml = right > 1000 ? right - 1000 : right + 1000
      s.wrongSum.push('fuel_used_written_ml')
    },
  }),
  make('photocopy', 'ordinary', 'the scan of a photocopy: specks, 97 % of true size', {
    adjust: (c) => ({
      ...c,
      scan: { dpi: 300, grey: true, skew: -0.009, scale: 0.97, copied: true, contrast: 1.2, jpegQuality: 70 },
    }),
  }),
  make('curled', 'ordinary', 'paper that was rolled up', { draw: 2, adjust: (c) => ({ ...c, shot: upright(c), curl_mm: 13 }) }),
  make('turned', 'ordinary', 'upside down, stored lying with a tag', {
    adjust: (c) => ({ ...c, shot: upright(c, { roll: Math.PI + 0.05 }), optics: { ...c.optics, storedLying: true } }),
  }),
  make('blanks', 'ordinary', 'mandatory cells left blank', {
    adjust: (c) => ({ ...c, shot: upright(c), light: noShadow(c) }),
    change: (s) => {
      for (const key of ['jar_end_ml', 'depth_cm[7]', 'depth_cm[8]', 'tyre_p_unit', 'vent_open', 'rpm_load', 't_end']) {
        s.readings[key] = key === 'vent_open' ? false : null
      }
    },
  }),
  make('small', 'hard', 'the page fills little of the picture', {
    adjust: (c) => ({
      ...c,
      shot: { ...upright(c, { fill: 0.62, pitch: 0.1, yaw: -0.08, roll: 0.1 }), width: 3000, height: 4000 },
      light: noShadow(c),
    }),
  }),
  make('corner-missing', 'hard', 'a corner torn off with its code', {
    adjust: (c) => ({
      ...c,
      shot: upright(c, { pitch: 0.08, yaw: 0.06, fill: 0.88 }),
      light: { ...noShadow(c), level: 190 },
      lost: { corner: 1, legs: [32, 30], folded: false },
      curl_mm: 6,
    }),
  }),
  make('blurred', 'hard', 'a shaken hand', {
    adjust: (c) => ({
      ...c,
      shot: upright(c, { fill: 0.9, pitch: 0.1, yaw: 0.05 }),
      light: { ...noShadow(c), level: 190 },
      optics: { ...c.optics, defocus_px: 1.2, shake_px: 2.6, grain: 5 },
    }),
  }),
  make('four-sides', 'ordinary', 'four unlike sides and a diagonal, area in acres', {
    adjust: (c) => ({ ...c, shot: upright(c), light: noShadow(c), dirt: 'mud' }),
  }),
  make('thumb', 'hard', 'a thumb holds the page', {
    adjust: (c) => ({
      ...c,
      shot: upright(c, { fill: 0.86, pitch: 0.12, yaw: -0.1 }),
      light: { ...noShadow(c), level: 200 },
      thumb: true,
    }),
  }),
  make('three-pages', 'easy', 'three sheets scanned into one PDF', { draw: 2 }),
  make('nothing', 'ordinary', 'no sheet in the picture'),
  make('too-blurred', 'hard', 'out of focus: to be taken again', {
    adjust: (c) => ({ ...c, shot: upright(c, { fill: 0.8 }), optics: { ...c.optics, defocus_px: 9, shake_px: 6 } }),
  }),
  make('outside', 'hard', 'two corners outside the picture: to be taken again', {
    adjust: (c) => ({
      ...c,
      shot: upright(c, { fill: 0.93, off: [0.3, 0], pitch: 0.05, yaw: 0.05, roll: 0.03 }),
      light: noShadow(c),
    }),
  }),
]

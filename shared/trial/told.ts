/**
 * What is told of one run to people who were there: on the read-out and on the leaf. Only what was measured, with its ±; no
 * figure while a rule refuses it; and never more than "measured here, on that day": one run compares nothing with anything.
 */
import type { Operation } from './facts.ts'
import { roundByUncertainty } from './format.ts'
import type { Result, ResultKey } from './result.ts'
import { spoken } from './spoken.ts'

/** As kept with a record, or fresh from the formulas. */
export type ToldResult = Pick<Result, 'value' | 'U' | 'unit'> & { reason: { code: string; text: string } | null }
export type ToldResults = Readonly<Record<string, ToldResult | undefined>>

export interface ToldFigure {
  key: ResultKey
  label: string
  /** Rounded by the uncertainty. */
  value: string
  U: string | null
  unit: string
}

export interface Told {
  main: {
    key: ResultKey
    value: number
    U: number | null
    shown: string
    shownU: string | null
    words: string
    unit: string
  } | null
  /** Why there is no main figure. */
  refused: string | null
  /** One sentence to say aloud; null without a main figure. */
  sentence: string | null
  beside: ToldFigure[]
  notTested: string[]
}

/** What a run may be made for, the first that its sheet measures. */
const MAIN: ReadonlyArray<readonly [ResultKey, words: string]> = [
  ['l_per_ha', 'litres a hectare'],
  ['l_per_100_km', 'litres a hundred kilometres'],
  ['l_per_h', 'litres an hour'],
]

const WORK: Readonly<Record<Operation, string>> = {
  plough: 'ploughing',
  disc: 'discing',
  cultivator: 'cultivating',
  rotary_tiller: 'rotary tilling',
  harrow: 'harrowing',
  subsoiler: 'subsoiling',
  transport: 'hauling',
  pto_work: 'driving a machine',
}

const BESIDE: ReadonlyArray<readonly [ResultKey, label: string, unit: string]> = [
  ['l_per_acre', 'an acre', 'L'],
  ['l_per_h', 'an hour', 'L'],
  ['l_per_t_km', 'a tonne and km', 'L'],
  ['l_per_t', 'a tonne', 'L'],
  ['depth_mean_cm', 'depth', 'cm'],
  ['area_m2', 'area', 'm²'],
  ['fuel_ml', 'fuel', 'mL'],
  ['time_min', 'time', 'min'],
]

const measured = (result: ToldResult | undefined) => result?.reason?.code !== 'not_on_sheet'

export function toldOf(results: ToldResults, operation: string | null): Told {
  const [key, words] = MAIN.find(([k]) => results[k] && measured(results[k])) ?? (['l_per_h', 'litres an hour'] as const)
  const result = results[key]
  const value = result?.value ?? null
  const beside = BESIDE.filter(([k]) => k !== key).flatMap(([k, label, unit]) => figureOf(results[k], k, label, unit))
  const notTested = notTestedBy(results, operation)
  if (!result || value === null) {
    // Where the fuel is refused no other figure of fuel is told either; what was taped and timed stands.
    return { main: null, refused: result?.reason?.text ?? 'It was not measured.', sentence: null, beside, notTested }
  }
  const shown = roundByUncertainty(value, result.U)
  const main = { key, value, U: result.U, shown: shown.value, shownU: shown.U, words, unit: result.unit }
  return { main, refused: null, sentence: sentenceOf(main, results, operation), beside, notTested }
}

function figureOf(result: ToldResult | undefined, key: ResultKey, label: string, unit: string): ToldFigure[] {
  if (!result || result.value === null) return []
  const { value, U } = roundByUncertainty(result.value, result.U)
  return [{ key, label, value, U, unit }]
}

function sentenceOf(main: NonNullable<Told['main']>, results: ToldResults, operation: string | null): string {
  const onField = measured(results.area_m2)
  const depth = results.depth_mean_cm?.value ?? null
  const work = operation && operation in WORK ? WORK[operation as Operation] : onField ? 'working' : 'at work'
  const deep = onField && depth !== null ? ` ${spoken(String(Math.round(depth)))} centimetres deep` : ''
  const giveOrTake = main.shownU === null ? '' : `, give or take ${spoken(main.shownU)}`
  return `This tractor, ${onField ? 'on this field, ' : ''}on this day, ${work}${deep}: ${spoken(main.shown)} ${main.words}${giveOrTake}.`
}

function notTestedBy(results: ToldResults, operation: string | null): string[] {
  const onField = measured(results.area_m2)
  const missing = [
    ['depth_mean_cm', 'how deep'],
    ['slip_pct', 'wheel slip'],
  ].flatMap(([key = '', words = '']) => (onField && results[key] && results[key].value === null ? [words] : []))
  const other = onField
    ? ['other soils', 'other gears', 'the road']
    : operation === 'transport'
      ? ['other loads', 'other roads', 'the field']
      : ['other loads', 'the field']
  return [...other, 'other tractors', ...missing]
}

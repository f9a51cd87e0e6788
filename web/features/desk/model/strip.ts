/** The results a sheet stands for, at the foot of the desk, and what another reading would make of them. */
import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import type { Result, ResultKey, Results } from '../../../../shared/trial/result.ts'
import type { DeskItem } from './desk-items.ts'

/** In the order of what people ask first; the foot has room for six, and a sheet shows those it measures. */
const SHOWN: ReadonlyArray<{ key: ResultKey; words: string }> = [
  { key: 'fuel_ml', words: 'fuel used' },
  { key: 'l_per_ha', words: 'per hectare' },
  { key: 'l_per_acre', words: 'per acre' },
  { key: 'l_per_h', words: 'per hour' },
  { key: 'depth_mean_cm', words: 'depth' },
  { key: 'efc_ha_h', words: 'work rate' },
  { key: 'l_per_100_km', words: 'per 100 km' },
  { key: 'l_per_t', words: 'per tonne' },
  { key: 'l_per_t_km', words: 'per tonne and km' },
  { key: 'speed_km_h', words: 'speed' },
]
const ROOM = 6

export interface StripFigure {
  key: ResultKey
  words: string
  value: string | null
  U: string | null
  unit: string
  /** false while a doubt stands on a cell it comes from. */
  firm: boolean
  /** Why there is no figure. */
  reason: string | null
}

export function stripOf(results: Results, items: readonly DeskItem[]): StripFigure[] {
  const doubtful = new Set(items.filter((i) => i.open).flatMap((i) => (i.reading ? [i.reading.key] : i.cells)))
  const measured = SHOWN.filter(({ key }) => results[key].reason?.code !== 'not_on_sheet')
  return measured.slice(0, ROOM).map(({ key, words }) => {
    const result = results[key]
    const shown = result.value === null ? null : roundByUncertainty(result.value, result.U)
    return {
      key,
      words,
      value: shown?.value ?? null,
      U: shown?.U ?? null,
      unit: result.unit,
      firm: !result.from.some((cell) => doubtful.has(cell)),
      reason: result.reason?.text ?? null,
    }
  })
}

/** The figure that tells most about a cell: the first of the strip that is made of it. */
export function toldBy(results: Results, key: string): ResultKey | null {
  const preferred: ResultKey[] = [
    'l_per_ha',
    'depth_mean_cm',
    'l_per_100_km',
    'l_per_t',
    'l_per_h',
    'efc_ha_h',
    'speed_km_h',
    'slip_pct',
    'area_ha',
    'width_mean_m',
  ]
  return preferred.find((k) => results[k].from.includes(key)) ?? null
}

/** "14.1", to the places the figure's own uncertainty allows. */
export function figureText(result: Result): string {
  return result.value === null ? 'none' : roundByUncertainty(result.value, result.U).value
}

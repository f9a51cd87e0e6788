/** The figures of a run in the order they are read, and those that are missing by their reason. Pure. */
import type { ResultValue } from '../../../shared/schemas/record.ts'
import { roundByUncertainty } from '../../../shared/trial/format.ts'
import type { ResultKey } from '../../../shared/trial/result.ts'

export const FIGURE_GROUPS: ReadonlyArray<{ says: string; keys: readonly ResultKey[] }> = [
  {
    says: 'Fuel',
    keys: [
      'fuel_ml',
      'l_per_ha',
      'l_per_acre',
      'l_per_h',
      'l_per_100_km',
      'l_per_t',
      'l_per_t_km',
      'ml_per_m3',
      'fuel15_ml',
      'density15_kgm3',
      'mass_kg',
      'kg_per_h',
      'kg_per_ha',
      'fuel_cost_per_ha',
      'cost_per_ha',
    ],
  },
  {
    says: 'Depth, width and soil',
    keys: ['depth_mean_cm', 'depth_sd_cm', 'depth_cv_pct', 'width_mean_m', 'width_sd_m', 'width_cv_pct', 'soil_water_pct'],
  },
  { says: 'Plot and time', keys: ['area_m2', 'area_ha', 'area_written_m2', 'gross_min', 'time_min', 'field_time_min'] },
  { says: 'Work rate, speed and slip', keys: ['efc_ha_h', 'tfc_ha_h', 'fe_pct', 'speed_km_h', 'slip_pct'] },
  {
    says: 'Load, and fuel to expect: rough models, nothing here judges a tractor',
    keys: [
      'draft_n',
      'draft_low_n',
      'draft_high_n',
      'drawbar_kw',
      'pto_kw',
      'load_pct',
      'energy_kwh',
      'l_per_kwh',
      'g_per_kwh',
      'expected_l_per_h',
      'expected_l_per_ha',
      'expected_older_l_per_h',
      'yearly_l_per_h',
    ],
  },
]

/** A spread of ten readings is itself only known to about a fifth: two figures say all it knows. */
const TWO_FIGURES = /_(sd|cv)_/

/** Value and ± as shown; a figure without an uncertainty keeps no more digits than it can carry. */
export function shownFigure(result: ResultValue): { value: string; U: string | null } {
  const value = result.value ?? 0
  if (result.U === null && TWO_FIGURES.test(result.key)) return { value: String(Number(value.toPrecision(2))), U: null }
  return roundByUncertainty(value, result.U)
}

const NOT_ON_SHEET = 'This sheet does not measure it.'

/** Missing figures that share a reason are told once. */
export function missingByReason(results: readonly ResultValue[]): Array<{ reason: string; labels: string[] }> {
  const byReason = new Map<string, string[]>()
  for (const result of results) {
    if (result.value !== null) continue
    const absent = result.reason?.code === 'not_on_sheet'
    const reason = absent ? NOT_ON_SHEET : (result.reason?.text ?? 'No reason was kept.')
    byReason.set(reason, [...(byReason.get(reason) ?? []), result.label])
  }
  return [...byReason].map(([reason, labels]) => ({ reason, labels: [...new Set(labels)] }))
}

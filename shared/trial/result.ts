/** A figure that leaves the sheet: value, uncertainty, where it came from, or why it is not there. */
import type { FormulaId } from './formulas.ts'
import { type Measure, type Part, type Reason, standardUncertainty } from './measure.ts'

/** Version of the formulas that made a record's results. Change it with any change of a figure. */
export const FORMULA_VERSION = '1.1.0'

/** Coverage factor of every U (JCGM 100:2008 6.2). */
export const COVERAGE_K = 2

/** Every result: its unit, the formula that makes it (formulas.ts), and its name in words. */
export const RESULTS = {
  fuel_ml: { unit: 'mL', formula: 'C01', label: 'fuel used' },
  l_per_h: { unit: 'L/h', formula: 'C03', label: 'fuel per hour' },
  l_per_ha: { unit: 'L/ha', formula: 'C03', label: 'fuel per hectare' },
  l_per_acre: { unit: 'L/acre', formula: 'C03', label: 'fuel per acre' },
  ml_per_m3: { unit: 'mL/m³', formula: 'C04', label: 'fuel per m³ of soil' },
  fuel15_ml: { unit: 'mL', formula: 'C02', label: 'fuel used at 15 °C' },
  density15_kgm3: { unit: 'kg/m³', formula: 'C16', label: 'density at 15 °C' },
  mass_kg: { unit: 'kg', formula: 'C17', label: 'mass of fuel' },
  kg_per_h: { unit: 'kg/h', formula: 'C17', label: 'mass of fuel per hour' },
  kg_per_ha: { unit: 'kg/ha', formula: 'C17', label: 'mass of fuel per hectare' },
  area_m2: { unit: 'm²', formula: 'C05', label: 'area' },
  area_ha: { unit: 'ha', formula: 'C05', label: 'area' },
  area_written_m2: { unit: 'm²', formula: 'A_w', label: 'area as written' },
  gross_min: { unit: 'min', formula: 'T', label: 'start to end' },
  time_min: { unit: 'min', formula: 'T', label: 'time with the engine on' },
  field_time_min: { unit: 'min', formula: 'T_f', label: 'field time' },
  tfc_ha_h: { unit: 'ha/h', formula: 'C07', label: 'theoretical field capacity' },
  efc_ha_h: { unit: 'ha/h', formula: 'C08', label: 'effective field capacity' },
  fe_pct: { unit: '%', formula: 'C09', label: 'field efficiency' },
  depth_mean_cm: { unit: 'cm', formula: 'C10', label: 'mean depth' },
  depth_sd_cm: { unit: 'cm', formula: 'C10', label: 'spread of depth' },
  depth_cv_pct: { unit: '%', formula: 'C10', label: 'variation of depth' },
  width_mean_m: { unit: 'm', formula: 'C10', label: 'mean width' },
  width_sd_m: { unit: 'm', formula: 'C10', label: 'spread of width' },
  width_cv_pct: { unit: '%', formula: 'C10', label: 'variation of width' },
  speed_km_h: { unit: 'km/h', formula: 'C11', label: 'speed' },
  slip_pct: { unit: '%', formula: 'C12', label: 'wheel slip' },
  draft_n: { unit: 'N', formula: 'C22', label: 'draft to expect' },
  draft_low_n: { unit: 'N', formula: 'C22', label: 'draft to expect, low end' },
  draft_high_n: { unit: 'N', formula: 'C22', label: 'draft to expect, high end' },
  drawbar_kw: { unit: 'kW', formula: 'C18', label: 'power at the drawbar' },
  pto_kw: { unit: 'kW', formula: 'C18', label: 'power at the PTO' },
  load_pct: { unit: '%', formula: 'C19', label: 'load of the engine' },
  energy_kwh: { unit: 'kWh', formula: 'C18', label: 'work done' },
  l_per_kwh: { unit: 'L/kWh', formula: 'C18', label: 'fuel per work done' },
  g_per_kwh: { unit: 'g/kWh', formula: 'C18', label: 'mass of fuel per work done' },
  expected_l_per_h: { unit: 'L/h', formula: 'C19', label: 'fuel to expect per hour' },
  expected_older_l_per_h: { unit: 'L/h', formula: 'C20', label: 'fuel to expect per hour, older equation' },
  yearly_l_per_h: { unit: 'L/h', formula: 'C21', label: 'average of a year for this power' },
  expected_l_per_ha: { unit: 'L/ha', formula: 'C25', label: 'fuel to expect per hectare' },
  soil_water_pct: { unit: '%', formula: 'C23', label: 'soil water, of the dry soil' },
  fuel_cost_per_ha: { unit: 'money/ha', formula: 'C24', label: 'cost of fuel per hectare' },
  cost_per_ha: { unit: 'money/ha', formula: 'C24', label: 'cost per hectare' },
  l_per_100_km: { unit: 'L/100 km', formula: 'C03', label: 'fuel per 100 km' },
  l_per_t: { unit: 'L/t', formula: 'C03', label: 'fuel per tonne' },
  l_per_t_km: { unit: 'L/(t·km)', formula: 'C03', label: 'fuel per tonne and km' },
} as const satisfies Record<string, { unit: string; formula: FormulaId; label: string }>

export type ResultKey = keyof typeof RESULTS
export const RESULT_KEYS = Object.keys(RESULTS) as ResultKey[]

export interface Result {
  key: ResultKey
  label: string
  /** Unrounded; null with a reason. */
  value: number | null
  unit: string
  /** Standard uncertainty, in the unit; null where the budget has no parts for it. */
  u: number | null
  /** Expanded uncertainty, k times u. */
  U: number | null
  k: number
  /** Keys of the cells (and facts) the value came from. */
  from: string[]
  formula: string
  /** What was taken for granted, in words. */
  assumes: string[]
  /** The parts of u, largest first. */
  budget: Part[]
  reason: Reason | null
}

export type Results = Record<ResultKey, Result>

/** A result from a measure. `formula` tells where one key has several (slip A, B, C). */
export function resultOf(key: ResultKey, measure: Measure, formula: FormulaId = RESULTS[key].formula): Result {
  const base = { key, label: RESULTS[key].label, unit: RESULTS[key].unit, k: COVERAGE_K, from: measure.cells, formula }
  if (!measure.known) return { ...base, value: null, u: null, U: null, assumes: [], budget: [], reason: measure.reason }
  const u = measure.parts.length > 0 ? standardUncertainty(measure.parts) : null
  // A spreadsheet cell may hold 1e300: its square is no figure any more.
  if (!Number.isFinite(measure.value) || !Number.isFinite(u ?? 0)) {
    return {
      ...base,
      value: null,
      u: null,
      U: null,
      assumes: [],
      budget: [],
      reason: { code: 'impossible', text: 'The readings give no finite figure.' },
    }
  }
  const budget = [...measure.parts].sort((a, b) => b.u - a.u)
  return {
    ...base,
    value: measure.value,
    u,
    U: u === null ? null : COVERAGE_K * u,
    assumes: measure.assumes,
    budget,
    reason: null,
  }
}

/** The same result without its figure, for the reason given. A reason already there is the nearer one and stays. */
export function withoutValue(result: Result, reason: Reason): Result {
  if (result.value === null) return result
  return { ...result, value: null, u: null, U: null, assumes: [], budget: [], reason }
}

/** How each figure of a run is computed, in words of that very figure: for the record page. */
import { formulaOf } from './formulas.ts'
import type { ResultKey } from './result.ts'

/** Where one key has several ways (the plot's shape, slip A, B, C) the result tells which: see `howOf`. */
const HOW: Record<ResultKey, string> = {
  fuel_ml: 'jar at the start + top-ups − jar at the end',
  l_per_h: 'fuel used ÷ time with the engine on',
  l_per_ha: 'fuel used ÷ area',
  l_per_acre: 'fuel used ÷ area in acres',
  ml_per_m3: 'fuel used ÷ (area × mean depth)',
  fuel15_ml: 'each level brought to 15 °C by its own temperature, then the balance',
  density15_kgm3: 'as it was told',
  mass_kg: 'fuel used at 15 °C × density at 15 °C',
  kg_per_h: 'mass of fuel ÷ time with the engine on',
  kg_per_ha: 'mass of fuel ÷ area',
  area_m2: 'from the sides taped on the plot',
  area_ha: 'from the sides taped on the plot; 10 000 m² are 1 ha',
  area_written_m2: 'area by hand × m² of its unit',
  gross_min: 'end − start',
  time_min: 'end − start − stops with the engine off',
  field_time_min: 'time with the engine on − stops that are no field work',
  tfc_ha_h: 'rated width × speed ÷ 10',
  efc_ha_h: 'area ÷ field time',
  fe_pct: '100 × effective ÷ theoretical field capacity',
  depth_mean_cm: 'mean of the depths',
  depth_sd_cm: 'standard deviation of the depths, with n − 1',
  depth_cv_pct: '100 × spread ÷ mean depth',
  width_mean_m: 'mean of the widths',
  width_sd_m: 'standard deviation of the widths, with n − 1',
  width_cv_pct: '100 × spread ÷ mean width',
  speed_km_h: '3.6 × runs × distance ÷ all their times',
  slip_pct: 'way or turns in work against those without load',
  draft_n: 'by tool, soil, speed, width and depth; the table is right within 15 to 50 %',
  draft_low_n: 'draft to expect − the range of the table',
  draft_high_n: 'draft to expect + the range of the table',
  drawbar_kw: 'draft × speed',
  pto_kw: '2π × PTO speed × torque',
  load_pct: 'power asked of the PTO ÷ its rated power',
  energy_kwh: 'draft × way of all passes',
  l_per_kwh: 'fuel used, turns and all, ÷ work done',
  g_per_kwh: 'mass of fuel ÷ work done',
  expected_l_per_h: 'by load, engine speed and rated PTO power',
  expected_older_l_per_h: 'by load and rated PTO power',
  yearly_l_per_h: '0.223 × rated PTO power',
  expected_l_per_ha: 'fuel to expect per hour ÷ effective field capacity',
  soil_water_pct: '100 × (wet − dry) ÷ (dry − can), mean of the samples',
  fuel_cost_per_ha: 'fuel per hectare × its price',
  cost_per_ha: 'fuel per hectare × its price + driver and machine per hour ÷ field capacity',
  l_per_100_km: 'fuel used ÷ distance driven × 100',
  l_per_t: 'fuel used ÷ load of all trips',
  l_per_t_km: 'fuel used ÷ (load × way it was carried)',
}

/** Words of a figure where a cell tells that it was made another way. */
const OTHERWISE: ReadonlyArray<{ key: ResultKey; cell: string; says: string }> = [
  { key: 'fuel_ml', cell: 'jar_start_g', says: '(jar before + top-ups − jar after, by mass) ÷ density' },
  { key: 'fuel15_ml', cell: 'jar_start_g', says: '(jar before + top-ups − jar after, by mass) ÷ density' },
  { key: 'mass_kg', cell: 'jar_start_g', says: 'jar before + top-ups − jar after, with what the air carried' },
  { key: 'density15_kgm3', cell: 'density_obs', says: 'from the hydrometer at its temperature' },
  { key: 'energy_kwh', cell: 'pto_torque_nm', says: 'PTO power × field time' },
  { key: 'l_per_t', cell: 'worked_kg', says: 'fuel used ÷ mass that went through the machine' },
]

interface Made {
  key: string
  formula: string
  /** Cells the value came from. */
  from: readonly string[]
}

/** The words of a result as it was made; of a key or formula of another version, what is known. */
export function howOf({ key, formula, from }: Made): string {
  if (key === 'area_m2' || key === 'area_ha') return shapeOf(from)
  if (key === 'slip_pct') return formulaOf(formula)?.says ?? HOW.slip_pct
  const other = OTHERWISE.find((way) => way.key === key && from.includes(way.cell))
  if (other) return other.says
  return (HOW as Record<string, string>)[key] ?? `by formula ${formula}`
}

function shapeOf(from: readonly string[]): string {
  const left = from.includes('deduct_m2') ? ' − the piece left out' : ''
  const has = (stem: string) => from.some((cell) => cell.startsWith(stem))
  if (has('diag_')) return `two triangles on the diagonal${left}`
  if (has('tri_')) return `triangles by their three sides, together${left}`
  return `${has('pass_count') ? 'passes × mean width × length' : 'length × breadth'}${left}`
}

const TAGS: Record<string, string> = { P: 'common practice', M: 'quoted from memory', F: 'seen in a published page' }

/** Where a formula is from, its tags written out: "ASAE EP496 (quoted from memory)". */
export function sourceWords(formula: string): string {
  const source = formulaOf(formula)?.source ?? 'a formula of another version'
  return source.replace(/( ?)\[([PMF])\]/g, (_, gap: string, tag: string) => (gap ? ` (${TAGS[tag]})` : (TAGS[tag] ?? '')))
}

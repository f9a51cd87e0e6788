/** Fuel by weighing the jar before and after (method W): no mark, no tilt and no temperature stands between. */
import type { Facts } from './facts.ts'
import { fuelMass } from './fuel.ts'
import { derive, known, lacking, type Measure } from './measure.ts'
import { ml, quantity } from './quantity.ts'
import { numberAt, type Readings, repeats, textAt } from './readings.ts'
import { SPREAD, stepDifferenceU } from './uncertainty.ts'

/** What air carries of a weighed litre, kg/m³ (ASTM D1250, from memory). */
const AIR_KGM3 = 1.1
const MASSES = ['jar_start_g', 'jar_end_g'] as const

/** Weighed, and the masses are on the sheet. */
export const isWeighed = (readings: Readings): boolean =>
  textAt(readings, 'fuel_method') === 'W' && MASSES.some((key) => readings[key] !== undefined)

/** Fuel burned as the balance shows it in air, g. A jug is weighed before and after each top-up: that difference is written. */
export function measureWeighed(readings: Readings, facts: Facts): Measure {
  const [start, end] = MASSES.map((key) => numberAt(readings, key))
  const topups = repeats(readings, 'topup_g')
  const cells = [...MASSES, ...topups.map((t) => t.key)]
  if (start == null || end == null) return lacking('blank', 'No fuel figure without both masses of the jar.', cells)
  const poured = topups.reduce((sum, t) => sum + t.value, 0)
  const step = facts.balanceStep_g ?? SPREAD.balanceStep_g
  const assumes = facts.balanceStep_g == null ? [`balance read to ${SPREAD.balanceStep_g} g`] : []
  const u = Math.sqrt(1 + topups.length) * stepDifferenceU(step)
  return known(start + poured - end, cells, [{ name: 'reading the balance', u }], assumes)
}

/** mL at 15 °C of a mass weighed in air. */
export const weighedVolume = (weighed: Measure, density: Measure): Measure =>
  derive([weighed, density], (g = 0, rho = 1) => (1000 * g) / (rho - AIR_KGM3))

/** kg in vacuo of a mass weighed in air. */
export const weighedMass = (weighed: Measure, density: Measure): Measure =>
  derive([weighed, density], (g = 0, rho = 1) => fuelMass(ml((1000 * g) / (rho - AIR_KGM3)), quantity(rho, 'kg/m3')))

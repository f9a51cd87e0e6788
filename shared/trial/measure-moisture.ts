/** Soil water over the samples of a plot (C23), % of the dry soil. */
import { derive, known, lacking, type Measure } from './measure.ts'
import { soilWater_pct } from './moisture.ts'
import { indexes, numberAt, type Readings } from './readings.ts'
import { mean, typeA } from './stats.ts'
import { SPREAD, stepU } from './uncertainty.ts'

const STEMS = ['moist_can_g', 'moist_wet_g', 'moist_dry_g'] as const

function sample(readings: Readings, n: number): Measure {
  const masses = STEMS.map((stem) => {
    const key = `${stem}[${n}]`
    const value = numberAt(readings, key)
    return value === null
      ? lacking('blank', `Soil sample ${n} lacks a mass.`, [key])
      : known(value, [key], [{ name: 'soil balance', u: stepU(SPREAD.soilBalanceStep_g) }])
  })
  // Can, dry, wet in this order (rule Q50); otherwise the masses say nothing.
  return derive(masses, (can = 0, wet = 0, dry = 0) => (can < dry && dry < wet ? soilWater_pct(can, wet, dry) : Number.NaN))
}

/** Mean of the samples: their scatter, and the balance. */
export function measureSoilWater(readings: Readings): Measure {
  const samples = indexes(readings, STEMS[0]).map((n) => sample(readings, n))
  if (samples.length === 0) return lacking('not_on_sheet', 'No soil was dried.', ['moist_can_g[1]'])
  const average = derive(samples, (...values) => mean(values))
  if (!average.known) return average
  const scatter = typeA(samples.flatMap((s) => (s.known ? [s.value] : [])))
  const parts = scatter === null ? average.parts : [{ name: 'scatter of the samples', u: scatter }, ...average.parts]
  return { ...average, parts }
}

/** Density of the fuel at 15 °C, kg/m³: told, or from a hydrometer reading at a temperature (C16). */
import type { Facts } from './facts.ts'
import { derive, known, lacking, type Measure } from './measure.ts'
import { quantity } from './quantity.ts'
import { numberAt, type Readings } from './readings.ts'
import { SPREAD, stepU } from './uncertainty.ts'
import { densityAt15 } from './volume-correction.ts'

const TOLD = 'density_15'
const OBSERVED = ['density_obs', 'density_temp_c'] as const

/** The hydrometer on the sheet comes before what a register says of the fuel of the region. */
export function measureDensity(readings: Readings, facts: Facts): Measure {
  if (numberAt(readings, TOLD) !== null) return inRange(known(numberAt(readings, TOLD) ?? 0, [TOLD], [hydrometer]))
  const [observed, temp] = OBSERVED.map((key) => numberAt(readings, key))
  if (observed != null && temp != null) return inRange(byHydrometer(observed, temp, facts.hydrometerGlass ?? false))
  const told = facts.density15_kgm3 ?? null
  if (told !== null) return inRange(known(told, [TOLD]))
  return observed != null
    ? lacking('blank', 'The density was observed at a temperature that is not written.', [...OBSERVED])
    : lacking('missing_fact', 'The density of the fuel at 15 °C is not known.', [TOLD])
}

const hydrometer = { name: 'reading the hydrometer', u: stepU(SPREAD.hydrometerStep_kgm3) }

function byHydrometer(observed: number, temp_c: number, glass: boolean): Measure {
  const inputs = [
    known(observed, ['density_obs'], [hydrometer]),
    known(temp_c, ['density_temp_c'], [{ name: 'temperature of the hydrometer', u: stepU(SPREAD.thermometerStep_c) }]),
  ]
  return derive(inputs, (rho = 0, t = 0) => densityAt15(quantity(rho, 'kg/m3'), t, { glass }))
}

/** The table of volumes reaches from 653 to 1075 kg/m³: outside there is no diesel, and often another unit. */
function inRange(density: Measure): Measure {
  if (!density.known || (density.value >= 653 && density.value <= 1075)) return density
  return lacking('impossible', `Density ${density.value} kg/m³ is no diesel: written in g/mL?`, density.cells)
}

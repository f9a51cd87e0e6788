/**
 * Areas written in a unit of the district. Such units are no constants: pages about them contradict each other, so only one that
 * a person confirmed for the district makes square metres.
 */
import type { Facts, LandUnit } from './facts.ts'
import { known, lacking, type Measure } from './measure.ts'
import { convert, quantity, unitFromTick } from './quantity.ts'
import { numberAt, type Readings, textAt } from './readings.ts'

const FIXED = ['m2', 'ha', 'acre'] as const
type Fixed = (typeof FIXED)[number]

/** Sizes as land-record and property pages give them [F], to be confirmed or refused by somebody who knows the district. */
export const SUGGESTED_LAND_UNITS: ReadonlyArray<{ name: string; where: string; size_m2: number; source: string }> = [
  { name: 'bigha', where: 'West Bengal', size_m2: 1337.803776, source: '14 400 ft²' },
  { name: 'pucca bigha', where: 'not told', size_m2: 2529.285264, source: '165 × 165 ft' },
  { name: 'bigha', where: 'Rajasthan', size_m2: 1618.74256896, source: '132 × 132 ft' },
  { name: 'kaccha bigha', where: 'not told', size_m2: 843.0950601290881, source: '1008.33 yd²' },
  { name: 'bigha', where: 'hills', size_m2: 809.37128448, source: '968 yd²' },
  { name: 'guntha', where: 'not told', size_m2: 101.17141056, source: '1089 ft²' },
  { name: 'kanal', where: 'not told', size_m2: 505.8570528, source: '5445 ft²' },
  { name: 'marla', where: 'not told', size_m2: 25.29285264, source: '272.25 ft²' },
  { name: 'cent', where: 'not told', size_m2: 40.468564224, source: '435.6 ft²' },
]

export const isFixedUnit = (unit: string): unit is Fixed => FIXED.some((fixed) => fixed === unit)

/** The unit of the district by its name, whether or not somebody confirmed it. */
export const localUnit = (facts: Facts, name: string): LandUnit | null =>
  facts.landUnits?.find((unit) => unit.name.toLowerCase() === name.toLowerCase()) ?? null

/** m² of one such unit; null for a name that is no unit here, or is not confirmed. */
export function sizeOfLandUnit(facts: Facts, name: string): number | null {
  if (isFixedUnit(name)) return convert(quantity(1, unitFromTick('area', name)), name, 'm2')
  const unit = localUnit(facts, name)
  return unit?.confirmedBy ? unit.size_m2 : null
}

/** The area as it was written, in m². */
export function measureWrittenArea(readings: Readings, facts: Facts): Measure {
  const cells = ['area_written', 'area_unit']
  const [written, name] = [numberAt(readings, 'area_written'), textAt(readings, 'area_unit')]
  if (written === null || name === null) return lacking('blank', 'No area is written by hand, or its unit is missing.', cells)
  const size_m2 = sizeOfLandUnit(facts, name)
  if (size_m2 === null) {
    const why = localUnit(facts, name) ? 'has not been confirmed' : 'is not known'
    return lacking('missing_fact', `The unit “${name}” ${why} for this district: nobody has said how many m² it holds.`, cells)
  }
  const unit = localUnit(facts, name)
  const on = unit?.confirmedOn ? ` on ${unit.confirmedOn}` : ''
  const assumes = unit ? [`1 ${unit.name} is ${unit.size_m2} m², confirmed by ${unit.confirmedBy}${on}`] : []
  return known(written * size_m2, cells, [], assumes)
}

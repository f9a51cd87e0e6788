/** Fuel by balance of the jar, and what is made of it (C01, C02, C03, C04, C17). */
import { convert, ml, type Quantity, quantity } from './quantity.ts'
import { volumeCorrection } from './volume-correction.ts'

type Millilitres = Quantity<'mL'>

/** C01, mL: what was in the jar, plus what was poured in, less what is left. Mass balance; common practice. */
export const fuelUsed = (start: Millilitres, topups: readonly Millilitres[], end: Millilitres): Millilitres =>
  ml(start + topups.reduce((sum, x) => sum + x, 0) - end)

export interface Level {
  volume: Millilitres
  temp_c: number
}

/**
 * C02, mL at 15 °C: each level is corrected at its own temperature. Correcting the difference instead is 0.8 % off on
 * the golden sheet, since what is left in the jar has grown warm.
 */
export function fuelAt15(start: Level, topups: readonly Level[], end: Level, density15: Quantity<'kg/m3'>): Millilitres {
  const at15 = (level: Level) => level.volume * volumeCorrection(density15, level.temp_c)
  return ml(at15(start) + topups.reduce((sum, level) => sum + at15(level), 0) - at15(end))
}

/** C17, kg in vacuo: volume at 15 °C times density at 15 °C (ASTM D1250). */
export const fuelMass = (fuel15: Millilitres, density15: Quantity<'kg/m3'>): Quantity<'kg'> =>
  quantity(convert(fuel15, 'mL', 'm3') * density15, 'kg')

/** C03, L/h. Stops with the engine off are already out of `time`. */
export const fuelPerHour = (fuel: Millilitres, time: Quantity<'h'>): Quantity<'L/h'> =>
  quantity(convert(fuel, 'mL', 'L') / time, 'L/h')

/** C03, L/ha. */
export const fuelPerHectare = (fuel: Millilitres, area: Quantity<'m2'>): Quantity<'L/ha'> =>
  quantity(convert(fuel, 'mL', 'L') / convert(area, 'm2', 'ha'), 'L/ha')

/** C03, L/acre (international acre). */
export const fuelPerAcre = (fuel: Millilitres, area: Quantity<'m2'>): Quantity<'L/acre'> =>
  quantity(convert(fuel, 'mL', 'L') / convert(area, 'm2', 'acre'), 'L/acre')

/** C04, mL per m³ of soil moved: shallow work is not sold as saving. */
export const fuelPerSoil = (fuel: Millilitres, area: Quantity<'m2'>, depth: Quantity<'cm'>): Quantity<'mL/m3'> =>
  quantity(fuel / (area * convert(depth, 'cm', 'm')), 'mL/m3')

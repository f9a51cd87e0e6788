/** How much to burn so that the figure says something: told when a trial is planned, and during the run. */
import { ml, type Quantity, squareMetres } from './quantity.ts'

export interface LeastFuelInput {
  /** Wanted expanded uncertainty (k = 2), % of the result. */
  U_pct: number
  /** Step the jar is read to. */
  jarStep_ml: number
  jugMark_ml: number
  topups: number
  /** Half-width of the scale error of the kit, %. */
  scale_pct: number
  /** Relative standard uncertainty of the area, %; 0 for litres per hour. */
  area_u_pct: number
}

/**
 * Least fuel to burn, mL, for a wanted uncertainty: √((δ²/6 + n·m²/12) / ((U/200)² − cal²/3 − r²)) (JCGM 100:2008
 * 5.1.6, solved for the fuel). Null when scale and area alone are less sure than wanted: no fuel is enough.
 */
export function leastFuel(input: LeastFuelInput): Quantity<'mL'> | null {
  const reading = input.jarStep_ml ** 2 / 6 + (input.topups * input.jugMark_ml ** 2) / 12
  const left = (input.U_pct / 200) ** 2 - (input.scale_pct / 100) ** 2 / 3 - (input.area_u_pct / 100) ** 2
  return left <= 0 ? null : ml(Math.sqrt(reading / left))
}

export interface LeastAreaInput extends Omit<LeastFuelInput, 'area_u_pct'> {
  /** Fuel to expect, L/ha. */
  fuel_l_per_ha: number
  /** Effective width of the implement and length of a pass, m: the edge of the plot is half a width along a pass. */
  width_m: number
  pass_m: number
}

/**
 * Least area to work, m², so that litres a hectare are known to ± U: fuel read and edge of the plot both shrink with the area,
 * the scale of the kit does not. √((reading ÷ q² + (w L)²/12) ÷ ((U/200)² − cal²/3)), q in mL/m² (JCGM 100:2008 5.1.6).
 * The tape itself, about 0.2 %, is left out. Null when the scale alone is less sure than wanted.
 */
export function leastArea(input: LeastAreaInput): Quantity<'m2'> | null {
  const fuel = leastFuel({ ...input, area_u_pct: 0 })
  if (fuel === null || input.fuel_l_per_ha <= 0) return null
  const perArea = input.fuel_l_per_ha / 10
  const left = (input.U_pct / 200) ** 2 - (input.scale_pct / 100) ** 2 / 3
  const edge = (input.width_m * input.pass_m) ** 2 / 12
  return squareMetres(Math.sqrt((fuel / perArea) ** 2 + edge / left))
}

/** A volume in whole marks of the jar, rounded up. */
export const marksOf = (volume_ml: number, jarMark_ml: number): number => Math.ceil(volume_ml / jarMark_ml - 1e-9)

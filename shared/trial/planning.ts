/** How much to burn so that the figure says something: told when a trial is planned, and during the run. */
import { ml, type Quantity } from './quantity.ts'

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

/**
 * Diesel grows with heat (C15, C16). ASTM D1250-80 / API MPMS 11.1 Table 54B, generalized products; constants as seen in
 * five public codes, the bought standard was not opened. The form steps by up to 8e-5 at 788 and 1e-5 to 3e-5 at 839 kg/m³.
 * The 2004 edition works from 60 °F: expect up to 1e-4 difference.
 */
import { type Quantity, quantity } from './quantity.ts'

type Density = Quantity<'kg/m3'>
const BASE_C = 15

/** Expansion coefficient at 15 °C, 1/K. @throws RangeError outside 653 to 1075 kg/m³ (g/mL for kg/m³?). */
export function expansion(density15: Density): number {
  if (density15 < 653 || density15 > 1075)
    throw new RangeError(`density ${density15} kg/m³ is outside 653 to 1075: written in g/mL?`)
  if (density15 < 770.5) return 346.4228 / density15 ** 2 + 0.4388 / density15
  if (density15 < 788) return -0.00336312 + 2680.3206 / density15 ** 2
  if (density15 < 839) return 594.5418 / density15 ** 2
  return 186.9696 / density15 ** 2 + 0.4862 / density15
}

/** C15: factor that brings a volume at `temp_c` to 15 °C. */
export function volumeCorrection(density15: Density, temp_c: number): number {
  const grown = expansion(density15) * (temp_c - BASE_C)
  return Math.exp(-grown * (1 + 0.8 * grown))
}

/**
 * C16: density at 15 °C from a hydrometer reading at `temp_c`, kg/m³, by repeated substitution. The glass of the hydrometer
 * is left out unless asked for.
 */
export function densityAt15(observed: Density, temp_c: number, options: { glass?: boolean } = {}): Density {
  const warm = temp_c - BASE_C
  const reading = options.glass ? observed * (1 - 2.3e-5 * warm - 2e-8 * warm ** 2) : observed
  let density = reading
  for (let step = 0; step < 50; step++) {
    const next = reading / volumeCorrection(quantity(density, 'kg/m3'), temp_c)
    if (Math.abs(next - density) < 1e-10) return quantity(next, 'kg/m3')
    density = next
  }
  // Across a step of the table the substitution swings by less than 1e-4; the last value is as good as any there.
  return quantity(density, 'kg/m3')
}

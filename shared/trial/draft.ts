/**
 * Draft, power and the fuel to expect (C18 to C22, C25). ASAE D497 constants as seen in public research code and pages; those
 * marked [M] from memory. The bought standard was not opened: bands are wide, and nothing here judges a tractor.
 */

import type { Operation } from './facts.ts'
import { type Quantity, quantity } from './quantity.ts'

export type Soil = 'fine' | 'medium' | 'coarse'

interface DraftFigures {
  a: number
  b: number
  c: number
  soil: Record<Soil, number>
  /** Range around the figure, %. */
  range_pct: number
  /** What the width stands for: metres, or a number of tools. */
  per: 'metre' | 'tool'
  source: '[F]' | '[M]'
}

/** D497 table 1, SI. PTO-driven rotary tillers are not in this equation. */
export const DRAFT: Readonly<Record<'plough' | 'subsoiler' | 'chisel' | 'tandem_disc' | 'field_cultivator', DraftFigures>> = {
  plough: { a: 652, b: 0, c: 5.1, soil: { fine: 1, medium: 0.7, coarse: 0.45 }, range_pct: 40, per: 'metre', source: '[F]' },
  subsoiler: { a: 226, b: 0, c: 1.8, soil: { fine: 1, medium: 0.7, coarse: 0.45 }, range_pct: 50, per: 'tool', source: '[M]' },
  chisel: { a: 91, b: 5.4, c: 0, soil: { fine: 1, medium: 0.85, coarse: 0.65 }, range_pct: 50, per: 'tool', source: '[F]' },
  tandem_disc: { a: 309, b: 16, c: 0, soil: { fine: 1, medium: 0.88, coarse: 0.78 }, range_pct: 50, per: 'metre', source: '[M]' },
  field_cultivator: {
    a: 46,
    b: 2.8,
    c: 0,
    soil: { fine: 1, medium: 0.85, coarse: 0.65 },
    range_pct: 30,
    per: 'tool',
    source: '[M]',
  },
}

/** C22, N: F·(A + B·S + C·S²)·W·T, with S in km/h, T in cm and W in metres or tools (as the figures say). */
export function draft_n(
  figures: DraftFigures,
  soil: Soil,
  speed: Quantity<'km/h'>,
  width: number,
  depth: Quantity<'cm'>,
): number {
  return figures.soil[soil] * (figures.a + figures.b * speed + figures.c * speed ** 2) * width * depth
}

/** C18, kW at the drawbar. */
export const drawbarPower = (draft_kn: number, speed: Quantity<'km/h'>): Quantity<'kW'> =>
  quantity((draft_kn * speed) / 3.6, 'kW')

/** C18, kW at the PTO from torque, N·m, and speed, r/min. */
export const ptoPower = (torque_nm: number, rpm: number): Quantity<'kW'> =>
  quantity((2 * Math.PI * rpm * torque_nm) / 60_000, 'kW')

/** Drawbar over PTO power by drive and surface, D497 figure 1 [M]. */
export const TRACTION = {
  '2WD': { concrete: 0.87, firm: 0.72, tilled: 0.67, soft: 0.55 },
  '4WD': { concrete: 0.87, firm: 0.78, tilled: 0.75, soft: 0.7 },
} as const

/** C19, litres a kWh of PTO work at load share X and full throttle (D497.7; Grisso et al. 2004). */
export const specificFuel_l_kwh = (load: number): number => 0.22 + 0.096 / load

/** C19, L/h. `load` X: PTO-equivalent load over rated PTO power; `throttle` N: engine speed over that at full throttle. */
export function expectedFuel(load: number, throttle: number, rated: Quantity<'kW'>): Quantity<'L/h'> {
  return quantity((0.22 * load + 0.096) * throttleFactor(load, throttle) * rated, 'L/h')
}

/** Saving by gearing up and throttling back, as a factor (VCE 442-073). */
export const throttleFactor = (load: number, throttle: number): number => 1 - (throttle - 1) * (0.45 * load - 0.877)

/** C20, litres a kWh by the older D497.4. */
export const olderSpecificFuel_l_kwh = (load: number): number => 2.64 * load + 3.91 - 0.203 * Math.sqrt(738 * load + 173)

/** C21, L/h averaged over a year (EP496.3 as quoted). */
export const yearlyFuel = (rated: Quantity<'kW'>): Quantity<'L/h'> => quantity(0.223 * rated, 'L/h')

/** C25, L/ha. */
export const expectedPerHectare = (perHour: Quantity<'L/h'>, capacity: Quantity<'ha/h'>): Quantity<'L/ha'> =>
  quantity(perHour / capacity, 'L/ha')

/** The draft figures of an operation whose width is in metres; null where the equation wants a number of tools, or does not hold. */
export function draftFiguresOf(operation: Operation): DraftFigures | null {
  if (operation === 'plough') return DRAFT.plough
  return operation === 'disc' ? DRAFT.tandem_disc : null
}

/**
 * Draft, power and the fuel to expect (C18 to C22, C25). ASAE D497 constants as seen in public research code and pages; those
 * marked [M] from memory. The bought standard was not opened: bands are wide, and nothing here judges a tractor.
 */

import type { Operation } from './facts.ts'
import { type Quantity, quantity } from './quantity.ts'
import type { Soil } from './soil.ts'

interface DraftFigures {
  a: number
  b: number
  c: number
  soil: Record<Soil, number>
  /** Range around the figure, %. */
  range_pct: number
  /** What the width stands for: metres, or a number of tools. */
  per: 'metre' | 'tool'
}

const HARD = { fine: 1, medium: 0.7, coarse: 0.45 }
const TINED = { fine: 1, medium: 0.85, coarse: 0.65 }
const DISCED = { fine: 1, medium: 0.88, coarse: 0.78 }

const row = (a: number, b: number, c: number, soil: Record<Soil, number>, range_pct: number, per: DraftFigures['per']) =>
  ({ a, b, c, soil, range_pct, per }) satisfies DraftFigures

/**
 * D497 table 1, SI. A, B, C of plough, chisel, secondary field cultivator and the soil factors were seen in pages and code [F];
 * the other figures and all ranges are from memory [M]. PTO-driven rotary tillers are not in this equation.
 */
export const DRAFT = {
  plough: row(652, 0, 5.1, HARD, 40, 'metre'),
  subsoiler: row(226, 0, 1.8, HARD, 50, 'tool'),
  winged_subsoiler: row(294, 0, 2.4, HARD, 50, 'tool'),
  chisel: row(91, 5.4, 0, TINED, 50, 'tool'),
  chisel_sweep: row(107, 6.3, 0, TINED, 50, 'tool'),
  chisel_twisted: row(123, 7.3, 0, TINED, 50, 'tool'),
  tandem_disc: row(309, 16, 0, DISCED, 50, 'metre'),
  tandem_disc_secondary: row(216, 11.2, 0, DISCED, 30, 'metre'),
  offset_disc: row(364, 18.8, 0, DISCED, 50, 'metre'),
  offset_disc_secondary: row(254, 13.2, 0, DISCED, 30, 'metre'),
  field_cultivator: row(46, 2.8, 0, TINED, 30, 'tool'),
  field_cultivator_secondary: row(32, 1.9, 0, TINED, 25, 'tool'),
  row_cultivator: row(140, 7, 0, TINED, 15, 'tool'),
} as const satisfies Record<string, DraftFigures>

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

/** The usual tool of an operation; the others of the table are named by the implement's type. */
const TOOL_OF: Partial<Record<Operation, keyof typeof DRAFT>> = {
  plough: 'plough',
  disc: 'tandem_disc',
  cultivator: 'field_cultivator',
  subsoiler: 'subsoiler',
}

/** The draft figures of a tool; null where the equation does not hold for it. */
export function draftFiguresOf(operation: Operation | null, type: string | null = null): DraftFigures | null {
  const named = type !== null && Object.hasOwn(DRAFT, type) ? (type as keyof typeof DRAFT) : null
  const tool = named ?? (operation ? TOOL_OF[operation] : undefined)
  return tool ? DRAFT[tool] : null
}

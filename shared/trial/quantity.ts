/**
 * Numbers that know their unit. A `Quantity<'mL'>` is a plain number at run time; handing it where `Quantity<'m'>` is wanted
 * does not compile. Unit ticks on paper arrive as text: `unitFromTick` refuses what it does not know.
 */
import { UserError } from '../errors.ts'

/**
 * Size of each unit in the first unit of its dimension. Exact by definition, or by exact definitions divided
 * (NIST SP 811 App. B, from memory; values checked in units.test.ts).
 */
const FOOT_M = 0.3048
const POUND_N = 4.4482216152605
const UNITS = {
  m: { dimension: 'length', size: 1 },
  cm: { dimension: 'length', size: 0.01 },
  mm: { dimension: 'length', size: 0.001 },
  ft: { dimension: 'length', size: FOOT_M },
  in: { dimension: 'length', size: 0.0254 },
  m2: { dimension: 'area', size: 1 },
  ha: { dimension: 'area', size: 10_000 },
  acre: { dimension: 'area', size: 4046.8564224 },
  L: { dimension: 'volume', size: 1 },
  mL: { dimension: 'volume', size: 0.001 },
  m3: { dimension: 'volume', size: 1000 },
  us_gal: { dimension: 'volume', size: 3.785411784 },
  imp_gal: { dimension: 'volume', size: 4.54609 },
  h: { dimension: 'time', size: 1 },
  min: { dimension: 'time', size: 1 / 60 },
  s: { dimension: 'time', size: 1 / 3600 },
  'km/h': { dimension: 'speed', size: 1 },
  'm/s': { dimension: 'speed', size: 3.6 },
  'mile/h': { dimension: 'speed', size: 1.609344 },
  kPa: { dimension: 'pressure', size: 1 },
  bar: { dimension: 'pressure', size: 100 },
  psi: { dimension: 'pressure', size: POUND_N / 0.0254 ** 2 / 1000 },
  'kgf/cm2': { dimension: 'pressure', size: 98.0665 },
  kW: { dimension: 'power', size: 1 },
  hp: { dimension: 'power', size: (550 * FOOT_M * POUND_N) / 1000 },
  metric_hp: { dimension: 'power', size: 0.73549875 },
  kg: { dimension: 'mass', size: 1 },
  'kg/m3': { dimension: 'density', size: 1 },
  'g/mL': { dimension: 'density', size: 1000 },
  'ha/h': { dimension: 'work rate', size: 1 },
  'acre/h': { dimension: 'work rate', size: 0.40468564224 },
  'L/h': { dimension: 'fuel rate', size: 1 },
  'L/ha': { dimension: 'fuel per area', size: 1 },
  'L/acre': { dimension: 'fuel per area', size: 1 / 0.40468564224 },
  'us_gal/acre': { dimension: 'fuel per area', size: 3.785411784 / 0.40468564224 },
  'mL/m3': { dimension: 'fuel per soil', size: 1 },
  '%': { dimension: 'share', size: 1 },
} as const

export type UnitName = keyof typeof UNITS
type DimensionOf<U extends UnitName> = (typeof UNITS)[U]['dimension']
/** Every unit that measures the same thing as U. */
export type SameDimension<U extends UnitName> = { [V in UnitName]: DimensionOf<V> extends DimensionOf<U> ? V : never }[UnitName]

declare const unitOf: unique symbol
/** A number in the unit U. */
export type Quantity<U extends UnitName> = number & { readonly [unitOf]: U }

/** Says that a plain number is in a unit. The only way in; it checks nothing but finiteness. */
export function quantity<U extends UnitName>(value: number, unit: U): Quantity<U> {
  if (!Number.isFinite(value)) throw new RangeError(`${value} ${unit} is not a number a formula can use`)
  return value as Quantity<U>
}

/** The same quantity in another unit of its dimension; another dimension does not compile, and throws when it arrives untyped. */
export function convert<U extends UnitName, V extends SameDimension<U>>(value: Quantity<U>, from: U, to: V): Quantity<V> {
  const a = UNITS[from]
  const b = UNITS[to as UnitName]
  if (a.dimension !== b.dimension)
    throw new RangeError(`${from} measures ${a.dimension}, ${String(to)} ${b.dimension}: they cannot be converted`)
  return quantity((value * a.size) / b.size, to)
}

const AREA_TICKS = ['m2', 'ha', 'acre'] as const
const PRESSURE_TICKS = ['kPa', 'bar', 'psi', 'kgf/cm2'] as const
const POWER_TICKS = ['kW', 'hp', 'metric_hp'] as const
const TICKS = { area: AREA_TICKS, pressure: PRESSURE_TICKS, power: POWER_TICKS } as const

/**
 * The unit a tick on the sheet names.
 * @throws UserError `invalid` when the text names no unit of that kind.
 */
export function unitFromTick<K extends keyof typeof TICKS>(kind: K, text: string): (typeof TICKS)[K][number] {
  const known: readonly string[] = TICKS[kind]
  if (!known.includes(text))
    throw new UserError('invalid', `"${text}" is no unit of ${kind}: one of ${known.join(', ')} is needed`)
  return text as (typeof TICKS)[K][number]
}

/** Short makers for the units formulas take most. */
export const ml = (value: number) => quantity(value, 'mL')
export const metres = (value: number) => quantity(value, 'm')
export const squareMetres = (value: number) => quantity(value, 'm2')
export const hours = (value: number) => quantity(value, 'h')
export const kmh = (value: number) => quantity(value, 'km/h')
export const seconds = (value: number) => quantity(value, 's')

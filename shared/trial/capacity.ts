/** Work rates (C07, C08, C09). Terms of ASAE EP496.3 and D497.7, from memory; clause numbers not checked. */
import { convert, type Quantity, quantity } from './quantity.ts'

type Kmh = Quantity<'km/h'>
type HectaresPerHour = Quantity<'ha/h'>

/** C07, ha/h: what the rated width would work at this speed without a turn or a stop. */
export const theoreticalCapacity = (ratedWidth: Quantity<'m'>, speed: Kmh): HectaresPerHour =>
  quantity((ratedWidth * speed) / 10, 'ha/h')

/** C07 in feet and miles an hour, acre/h. 8.25 = 43560/5280 (Iowa State A3-24, PM 696). */
export const theoreticalCapacityUs = (width: Quantity<'ft'>, speed: Quantity<'mile/h'>): Quantity<'acre/h'> =>
  quantity((width * speed) / 8.25, 'acre/h')

/** C08, ha/h: area over field time (turns, clogging, adjusting and filling are in it). */
export const effectiveCapacity = (area: Quantity<'m2'>, fieldTime: Quantity<'h'>): HectaresPerHour =>
  quantity(convert(area, 'm2', 'ha') / fieldTime, 'ha/h')

/** C09, %: effective over theoretical capacity, by the rated width. */
export const fieldEfficiency = (effective: HectaresPerHour, theoretical: HectaresPerHour): Quantity<'%'> =>
  quantity((100 * effective) / theoretical, '%')

/**
 * C09 the other way, %: share of the field time spent on passes at speed. Times (breadth ÷ passes) ÷ rated width it is the
 * field efficiency again, which is how a wrong count of passes shows.
 */
export const timeEfficiency = (passes: number, pass: Quantity<'m'>, speed: Kmh, fieldTime: Quantity<'h'>): Quantity<'%'> =>
  quantity((100 * passes * pass) / (1000 * speed * fieldTime), '%')

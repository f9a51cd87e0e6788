/** Gears as sheets and registers write them. */
import type { Readings } from './readings.ts'

/** "L3" from the tick of the range and the number; null where neither is written. */
export function gearOf(values: Readings): string | null {
  const parts = [values.gear_range, values.gear].filter((v) => typeof v === 'string' || typeof v === 'number')
  return parts.length > 0 ? parts.join('') : null
}

/** km/h in a gear at rated engine speed, from "L1 2.1, L2 3.4"; null for a gear that is not in it. */
export function gearSpeedOf(speeds: string, gear: string | null): number | null {
  const found = speeds.split(', ').find((entry) => entry.split(' ')[0] === gear)
  return found ? Number(found.split(' ')[1]) : null
}

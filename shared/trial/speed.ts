/** Speed over a pegged distance (C11), common practice. */
import { type Quantity, quantity } from './quantity.ts'

/**
 * km/h from n runs over the same distance: all the way by all the time. The mean of the speeds is another, larger number,
 * since it gives the fast run more weight. @throws RangeError without a run.
 */
export function speedOverPegs(distance: Quantity<'m'>, times: readonly Quantity<'s'>[]): Quantity<'km/h'> {
  const total = times.reduce((sum, t) => sum + t, 0)
  if (times.length === 0 || total <= 0) throw new RangeError('a speed needs at least one timed run')
  return quantity((3.6 * times.length * distance) / total, 'km/h')
}

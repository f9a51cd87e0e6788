/** Wheel slip, %, three ways (C12 to C14). Repeats enter as their mean: the ratio of means. */
import { type Quantity, quantity } from './quantity.ts'

/** C12 (method A): distance for the same wheel turns. ASAE S296.5 travel reduction ratio, from memory. */
export const slipByDistance = (loaded: Quantity<'m'>, unloaded: Quantity<'m'>): Quantity<'%'> =>
  quantity(100 * (1 - loaded / unloaded), '%')

/** C13 (method B): turns over the same distance; the loaded count divides. OECD Code 2, from memory, and a maker's 10-turn chart (OMRE283529). */
export const slipByTurns = (loaded: number, unloaded: number): Quantity<'%'> =>
  quantity((100 * (loaded - unloaded)) / loaded, '%')

/** C14 (method C): seconds over the same distance in the same gear at the same engine speed. Operator manual OMCQ72264. */
export const slipByTime = (loaded: Quantity<'s'>, unloaded: Quantity<'s'>): Quantity<'%'> =>
  quantity((100 * (loaded - unloaded)) / loaded, '%')

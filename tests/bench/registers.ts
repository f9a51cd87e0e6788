/** The registers of the world a set of photos was made in: every number written on them, and some that were not. */
import { isComb } from '../../shared/layouts/layout.ts'
import { findLayout } from '../../shared/layouts/registry.ts'
import type { Facts } from '../../shared/reading/weigh/types.ts'
import { chanceOf } from '../simulator/random.ts'
import type { Truth } from '../simulator/scenario.ts'

/** Numbers of a register that stand on none of the photos. */
const UNSEEN = 30

export function registersOf(truths: readonly Truth[]): NonNullable<Facts['known']> {
  const chance = chanceOf('registers')
  const known: Record<string, Set<number>> = {}
  for (const { layout, version, readings } of truths) {
    for (const cell of findLayout(layout, version)?.cells ?? []) {
      if (!isComb(cell) || !cell.register) continue
      known[cell.register] ??= new Set(Array.from({ length: UNSEEN }, () => chance.whole(1, 9999)))
      const number = readings[cell.key]
      if (typeof number === 'number') known[cell.register]?.add(number)
    }
  }
  return known
}

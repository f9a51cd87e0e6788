/** What an operation usually burns, L/ha: where a book has no median of its own yet. */
import type { Operation } from './facts.ts'

/** Plough: Missouri G1208, 1.68 gal/acre; disc, cultivator, harrow: the same table; the others [P], middle of a range. */
export const USUAL_L_HA: Readonly<Partial<Record<Operation, number>>> = {
  plough: 15.715,
  disc: 8.89,
  cultivator: 5.61,
  harrow: 3.74,
  rotary_tiller: 21,
  subsoiler: 22.5,
}

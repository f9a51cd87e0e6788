/** Whether a page knows black and white only: pale print, and so the frames of the boxes, is gone from it. */
import type { Grey } from '../pixels/grey.ts'

/** Between solid ink (1) and bare paper (0) lies pale print, and the edges of everything. */
const PALE = [0.15, 0.45] as const
const SOLID = 0.75
/** Pale dots against solid ones: simulated greys have half as many or more, black and white under a fifth, all of it edges. */
const LEAST_PALE = 0.3
/** Ink and paper are taken where this share of the picture is darker, or brighter. */
const END_SHARE = 0.02

export function isBlackAndWhite({ data }: Grey): boolean {
  const counts = new Uint32Array(256)
  for (const value of data) counts[value]!++
  const level = (share: number) => {
    let left = data.length * share
    for (let value = 0; value < 255; value++) {
      left -= counts[value]!
      if (left <= 0) return value
    }
    return 255
  }
  const [ink, paper] = [level(END_SHARE), level(1 - END_SHARE)]
  const between = (from: number, to: number) => {
    let sum = 0
    for (let value = 0; value < 256; value++) {
      const darkness = (paper - value) / Math.max(1, paper - ink)
      if (darkness >= from && darkness < to) sum += counts[value]!
    }
    return sum
  }
  return between(PALE[0], PALE[1]) < LEAST_PALE * between(SOLID, Number.POSITIVE_INFINITY)
}

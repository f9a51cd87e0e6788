/** Whether a picture without readable codes is blurred: it changes strongly over long ways, and weakly over short ones. */
import { type Grey, halve } from '../pixels/grey.ts'

/** Paper against ground, or print on paper: a picture with less of a step anywhere shows no sheet (0 to 255). */
const LEAST_STEP = 40
/** Sharp pictures of sheets keep more than seven tenths of the long step, one too blurred for its codes a third. */
const BLURRED_SHARE = 0.5
/** The step that this share of all neighbours exceeds: edges, but no single speck. */
const EDGE_SHARE = 0.002

/** @param half the picture at half size; steps are compared at a quarter and at a sixteenth of the full size */
export function isBlurred(half: Grey): boolean {
  const quarter = halve(half)
  const long = edgeStep(halve(halve(quarter)))
  return long >= LEAST_STEP && edgeStep(quarter) < BLURRED_SHARE * long
}

/** The step between neighbours side by side that only the strongest edges exceed, 0 to 255. */
function edgeStep({ width, height, data }: Grey): number {
  const counts = new Uint32Array(256)
  for (let y = 0; y < height; y++) {
    for (let at = y * width; at < (y + 1) * width - 1; at++) counts[Math.abs(data[at]! - data[at + 1]!)]!++
  }
  let left = height * (width - 1) * EDGE_SHARE
  for (let step = 255; step > 0; step--) {
    left -= counts[step]!
    if (left <= 0) return step
  }
  return 0
}

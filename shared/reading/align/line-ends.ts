/** Where the lines under signatures begin and end: what tells left from right at the foot of the page, where nothing else does. */
import type { Homography } from '../geometry/homography.ts'
import type { ResidualField } from '../geometry/residual-field.ts'
import type { Mark } from './marks.ts'
import { lineProfile, type Picture, samplePatch } from './patch.ts'

const STEP_MM = 0.15
/** An end is looked for so far from its place, mm: less than half of the gap to the next line. */
const REACH_MM = 1.45
/** Line on one side and paper on the other, over so much, mm. */
const SIDE_MM = 1
/** Looked at above and below the line, mm. */
const BESIDE_MM = 0.45
/** Darkness of the line over that of the paper at its end. */
const LEAST_CONTRAST = 0.08

/** The mark of one end of a line; null where no end is plain. `inside`: 1 where the line lies to the right of it, else -1. */
export function lineEnd(
  picture: Picture,
  homography: Homography,
  field: ResidualField,
  at: { x: number; y: number },
  inside: 1 | -1,
): Mark | null {
  const displacement = field.at(at)
  const half = REACH_MM + SIDE_MM
  const area = { x: at.x - half, y: at.y - BESIDE_MM, width: 2 * half, height: 2 * BESIDE_MM }
  const patch = samplePatch(picture, { homography, center: at, displacement }, area, STEP_MM)
  // The darkest third of a column is the line, whatever stands beside it.
  const dark = lineProfile(patch, 'columns', area.y, area.y + area.height, 0.34, 0.5)
  const side = Math.round(SIDE_MM / STEP_MM)
  const mean = (from: number) => dark.subarray(from, from + side).reduce((sum, v) => sum + v, 0) / side
  let best = { contrast: LEAST_CONTRAST, edge: -1 }
  for (let edge = side; edge + side <= dark.length; edge++) {
    const contrast = inside * (mean(edge) - mean(edge - side))
    if (contrast > best.contrast) best = { contrast, edge }
  }
  if (best.edge < 0) return null
  const off = best.edge * STEP_MM - half
  return { key: 'end', ...at, dx: displacement.dx + off, dy: displacement.dy, weight: 1 }
}

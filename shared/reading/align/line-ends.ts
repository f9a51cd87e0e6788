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
/** An end is believed where the ends nearest to it are as far off as it is, within this, mm: tails of signatures end as well. */
const AGREE_MM = 0.4
/** The ends nearest to one that are asked; fewer than two say nothing, and then the fields around are believed. */
const ASKED = 3

export interface LineEnd {
  mark: Mark
  /** To the right of where the fields around put it, mm. */
  off_mm: number
}

/** One end of a line; null where no end is plain. `inside`: 1 where the line lies to the right of it, else -1. */
export function lineEnd(
  picture: Picture,
  homography: Homography,
  field: ResidualField,
  at: { x: number; y: number },
  inside: 1 | -1,
): LineEnd | null {
  const displacement = field.at(at)
  const half = REACH_MM + SIDE_MM
  const area = { x: at.x - half, y: at.y - BESIDE_MM, width: 2 * half, height: 2 * BESIDE_MM }
  const patch = samplePatch(picture, { homography, center: at, displacement }, area, STEP_MM)
  // The darkest fifth of a column is the line, whatever stands beside it; a pen counts no more than print.
  const dark = lineProfile(patch, 'columns', area.y, area.y + area.height, 0.2, 0.4)
  const side = Math.round(SIDE_MM / STEP_MM)
  const mean = (from: number) => dark.subarray(from, from + side).reduce((sum, v) => sum + v, 0) / side
  let best = { contrast: LEAST_CONTRAST, edge: -1 }
  for (let edge = side; edge + side <= dark.length; edge++) {
    const contrast = inside * (mean(edge) - mean(edge - side))
    if (contrast > best.contrast) best = { contrast, edge }
  }
  if (best.edge < 0) return null
  const off_mm = best.edge * STEP_MM - half
  return { mark: { key: 'end', ...at, dx: displacement.dx + off_mm, dy: displacement.dy, weight: 1 }, off_mm }
}

/** The marks of the ends that agree with those beside them. */
export function agreeing(ends: readonly LineEnd[]): Mark[] {
  const agrees = (end: LineEnd) => {
    const away = (other: LineEnd) => Math.abs(other.mark.x - end.mark.x)
    const others = ends.filter((other) => other !== end).sort((a, b) => away(a) - away(b))
    const offs = others.slice(0, ASKED).map((other) => other.off_mm)
    const usual = offs.length < 2 ? 0 : offs.sort((a, b) => a - b)[offs.length >> 1]!
    return Math.abs(end.off_mm - usual) < AGREE_MM
  }
  return ends.filter(agrees).map(({ mark }) => mark)
}

/** How dark solid print is, from the marks nearby: lenses and hazy light lift black, and not everywhere alike. */
import type { Point } from '../pixels/grey.ts'

export interface BlackMark extends Point {
  darkness: number
}

/** Solid print in a fair picture; used where no mark was measured. */
const USUAL_BLACK = 0.85
/** Distances under this count alike, mm. */
const NEAR_MM = 40

export function blackAt(marks: readonly BlackMark[], at: Point): number {
  let sum = 0
  let weights = 0
  for (const mark of marks) {
    const weight = 1 / ((mark.x - at.x) ** 2 + (mark.y - at.y) ** 2 + NEAR_MM * NEAR_MM)
    sum += weight * mark.darkness
    weights += weight
  }
  return weights === 0 ? USUAL_BLACK : Math.max(0.25, sum / weights)
}

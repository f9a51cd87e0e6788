/** The paper as a bent sheet in space: bent along one direction only, as paper bends, so that lengths on it are kept. */
import type { Chance } from './random.ts'

export interface Wave {
  /** mm from crest to trough, half of it. */
  height_mm: number
  length_mm: number
  phase: number
}

export interface Bend {
  /** Direction of the bending across the page, radians from its x axis. */
  angle: number
  waves: readonly Wave[]
  /** An edge that lifts: begins at `from_mm` before the far edge and rises with this curvature (1/mm). */
  lift: { from_mm: number; curvature: number } | null
  /** A fold across the middle, once pressed flat: slope change over a few millimetres. */
  fold: number
  /** Lack of flatness in the other direction, mm. */
  ripple_mm: number
}

export type Space = readonly [number, number, number]

export interface Surface {
  /** Point in space (mm, z towards the camera) of a page point (mm from its top left). */
  at(x: number, y: number): Space
  /** Slope along the bend there, for shading. */
  slope(x: number, y: number): number
  angle: number
}

const REACH = 190
const STEP = 1

/** Builds the sheet around its middle; slopes are summed up once along the bend. */
export function bendSheet(bend: Bend, page: { width: number; height: number }): Surface {
  const count = (2 * REACH) / STEP + 1
  const slopes = new Float64Array(count)
  const along = new Float64Array(count)
  const up = new Float64Array(count)
  const liftStart = REACH - 60 - (bend.lift?.from_mm ?? 0)
  for (let i = 0; i < count; i += 1) {
    const s = i * STEP - REACH
    let slope = 0
    for (const w of bend.waves)
      slope += ((2 * Math.PI * w.height_mm) / w.length_mm) * Math.cos((2 * Math.PI * s) / w.length_mm + w.phase)
    if (bend.lift && s > liftStart) slope += bend.lift.curvature * (s - liftStart)
    slope += bend.fold * Math.tanh(s / 4)
    slopes[i] = Math.max(-0.9, Math.min(0.9, slope))
  }
  const middle = REACH / STEP
  for (let i = middle + 1; i < count; i += 1) {
    const p = (slopes[i]! + slopes[i - 1]!) / 2
    along[i] = along[i - 1]! + STEP / Math.sqrt(1 + p * p)
    up[i] = up[i - 1]! + (STEP * p) / Math.sqrt(1 + p * p)
  }
  for (let i = middle - 1; i >= 0; i -= 1) {
    const p = (slopes[i]! + slopes[i + 1]!) / 2
    along[i] = along[i + 1]! - STEP / Math.sqrt(1 + p * p)
    up[i] = up[i + 1]! - (STEP * p) / Math.sqrt(1 + p * p)
  }
  const lookUp = (table: Float64Array, s: number) => {
    const f = Math.max(0, Math.min(count - 1.001, (s + REACH) / STEP))
    const i = Math.floor(f)
    return table[i]! + (f - i) * (table[i + 1]! - table[i]!)
  }
  const [cos, sin] = [Math.cos(bend.angle), Math.sin(bend.angle)]
  const sOf = (x: number, y: number) => (x - page.width / 2) * cos + (y - page.height / 2) * sin
  return {
    angle: bend.angle,
    at: (x, y) => {
      const s = sOf(x, y)
      const t = -(x - page.width / 2) * sin + (y - page.height / 2) * cos
      const a = lookUp(along, s)
      const z = lookUp(up, s) + bend.ripple_mm * Math.sin(t / 37 + s / 61)
      return [a * cos - t * sin, a * sin + t * cos, z]
    },
    slope: (x, y) => lookUp(slopes, sOf(x, y)),
  }
}

/** A bend drawn up at random; `curl` is about how many millimetres the paper leaves the table. */
export function drawBend(chance: Chance, curl: number): Bend {
  const along = chance.odds(0.5) ? chance.normal(Math.PI / 2, 0.3) : chance.normal(0, 0.4)
  return {
    angle: along + (chance.odds(0.5) ? Math.PI : 0),
    waves: [
      { height_mm: curl * chance.between(0.3, 0.7), length_mm: chance.between(180, 420), phase: chance.between(0, 6.28) },
      { height_mm: curl * chance.between(0, 0.22), length_mm: chance.between(80, 150), phase: chance.between(0, 6.28) },
    ],
    lift: chance.odds(0.4) ? { from_mm: chance.between(10, 70), curvature: curl * chance.between(0.0002, 0.0008) } : null,
    fold: chance.odds(0.15) ? curl * chance.normal(0, 0.008) : 0,
    ripple_mm: curl * chance.between(0, 0.12),
  }
}

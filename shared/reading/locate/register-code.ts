/**
 * Sets a corner code's known pattern onto the picture, its middle to about a tenth of a pixel and its corners to a tenth of a
 * module: Gauss-Newton on an affine correction, with the print's contrast and the paper's level as two further unknowns.
 */
import { type Homography, multiply, project } from '../geometry/homography.ts'
import { LeastSquares } from '../geometry/linear.ts'
import { brightnessAt, type Grey } from '../pixels/grey.ts'

/** Samples a module and quiet modules around: enough to see edges from both sides. */
const PER_MODULE = 3
const QUIET = 2

export interface Pattern {
  modules: number
  side: number
  /** 1 dark, 0 light, smoothed; with its slopes a module. */
  value: Float32Array
  slopeX: Float32Array
  slopeY: Float32Array
}

/** The pattern as samples, smoothed over about a module as a lens would. */
export function makePattern(modules: readonly (readonly boolean[])[]): Pattern {
  const count = modules.length
  const side = (count + 2 * QUIET) * PER_MODULE
  const sharp = new Float32Array(side * side)
  for (let y = 0; y < side; y++) {
    const row = modules[Math.floor(y / PER_MODULE) - QUIET]
    for (let x = 0; x < side; x++) sharp[y * side + x] = row?.[Math.floor(x / PER_MODULE) - QUIET] ? 1 : 0
  }
  const at = (data: Float32Array, x: number, y: number) =>
    data[Math.min(Math.max(y, 0), side - 1) * side + Math.min(Math.max(x, 0), side - 1)]!
  const blur = (data: Float32Array, dx: number, dy: number) =>
    data.map((v, i) => {
      const x = i % side
      const y = (i / side) | 0
      return 0.5 * v + 0.25 * (at(data, x - dx, y - dy) + at(data, x + dx, y + dy))
    })
  const value = blur(blur(sharp, 1, 0), 0, 1)
  const slope = (dx: number, dy: number) =>
    value.map((_, i) => {
      const x = i % side
      const y = (i / side) | 0
      return (at(value, x + dx, y + dy) - at(value, x - dx, y - dy)) * (PER_MODULE / 2)
    })
  return { modules: count, side, value, slopeX: slope(1, 0), slopeY: slope(0, 1) }
}

const place = (i: number) => (i + 0.5) / PER_MODULE - QUIET

/** Correlation (-1 to 1) of the pattern with the picture under `toPhoto` (modules to px); every `stride`th sample. */
export function correlate(grey: Grey, pattern: Pattern, toPhoto: Homography, stride = 1): number {
  let n = 0
  let st = 0
  let stt = 0
  let sp = 0
  let spp = 0
  let stp = 0
  for (let y = stride >> 1; y < pattern.side; y += stride) {
    for (let x = stride >> 1; x < pattern.side; x += stride) {
      const to = project(toPhoto, place(x), place(y))
      if (to.x < 0 || to.y < 0 || to.x > grey.width || to.y > grey.height) continue
      const p = -brightnessAt(grey, to.x, to.y)
      const t = pattern.value[y * pattern.side + x]!
      n++
      st += t
      stt += t * t
      sp += p
      spp += p * p
      stp += t * p
    }
  }
  const whole = (pattern.side / stride) ** 2
  if (n < 0.6 * whole) return 0
  const spread = Math.sqrt((stt - (st * st) / n) * (spp - (sp * sp) / n))
  return spread < 1e-6 ? 0 : (stp - (st * sp) / n) / spread
}

export interface Registered {
  toPhoto: Homography
  correlation: number
}

const ROUNDS = 7
const STILL_MODULES = 0.002

/** Refines modules-to-pixels. Null when it runs away or ends without likeness. Catches about 0.7 of a module. */
export function registerPattern(grey: Grey, pattern: Pattern, start: Homography): Registered | null {
  let toPhoto = start
  const middle = pattern.modules / 2
  let moved = 0
  for (let round = 0; round < ROUNDS; round++) {
    const system = new LeastSquares(8)
    const row = new Float64Array(8)
    for (let y = 0; y < pattern.side; y++) {
      for (let x = 0; x < pattern.side; x++) {
        const i = y * pattern.side + x
        const u = place(x)
        const v = place(y)
        const to = project(toPhoto, u, v)
        if (to.x < 1 || to.y < 1 || to.x > grey.width - 1 || to.y > grey.height - 1) continue
        const sx = pattern.slopeX[i]!
        const sy = pattern.slopeY[i]!
        row[0] = sx
        row[1] = sx * (u - middle)
        row[2] = sx * (v - middle)
        row[3] = sy
        row[4] = sy * (u - middle)
        row[5] = sy * (v - middle)
        row[6] = pattern.value[i]!
        row[7] = 1
        system.add(row, brightnessAt(grey, to.x, to.y) / 255)
      }
    }
    // Unknowns 0 to 5 come multiplied by the contrast (unknown 6).
    const solved = system.solve()
    if (!solved || solved[6]! > -0.04) return null
    const [a, b, c, d, e, f] = Array.from(solved.subarray(0, 6), (value) => value / solved[6]!) as [
      number,
      number,
      number,
      number,
      number,
      number,
    ]
    // Picture(p) = pattern(p + q(p)), so the picture's place of pattern point p is p - q(p).
    const correction = [1 - b, -c, -a + b * middle + c * middle, -e, 1 - f, -d + e * middle + f * middle, 0, 0, 1]
    toPhoto = multiply(toPhoto, correction)
    const step = Math.hypot(a, d)
    const turn = Math.abs(b) + Math.abs(c) + Math.abs(e) + Math.abs(f)
    moved += step
    if (moved > 3 || turn > 0.4) return null
    if (step < STILL_MODULES && turn * middle < 2 * STILL_MODULES) break
  }
  return { toPhoto, correlation: correlate(grey, pattern, toPhoto, 2) }
}

/**
 * Sets a corner code's known pattern onto the picture, its middle to about a tenth of a pixel and its corners to a tenth of a
 * module: Gauss-Newton on an affine correction, with the print's contrast and the paper's level as two further unknowns.
 */
import { type Homography, multiply } from '../geometry/homography.ts'
import { solve } from '../geometry/linear.ts'
import { brightnessAt, type Grey } from '../pixels/grey.ts'

/** Samples a module and quiet modules around: enough to see edges from both sides. */
const PER_MODULE = 3
const QUIET = 2
const UNKNOWNS = 8

export interface Pattern {
  modules: number
  side: number
  /** 1 dark, 0 light, smoothed. */
  value: Float32Array
  /** What each sample says of the unknowns (a row of eight), and the sum of these rows times themselves. */
  rows: Float64Array
  normal: Float64Array
}

/** Sample to modules. */
const place = (i: number) => (i + 0.5) / PER_MODULE - QUIET

/** The pattern as samples, smoothed over about a module as a lens would. */
export function makePattern(modules: readonly (readonly boolean[])[]): Pattern {
  const count = modules.length
  const side = (count + 2 * QUIET) * PER_MODULE
  const sharp = new Float32Array(side * side)
  for (let y = 0; y < side; y++) {
    const row = modules[Math.floor(y / PER_MODULE) - QUIET]
    for (let x = 0; x < side; x++) sharp[y * side + x] = row?.[Math.floor(x / PER_MODULE) - QUIET] ? 1 : 0
  }
  // The quiet zone is white, so what lies beyond it may be taken from the other end of the row.
  const near = (data: Float32Array, i: number, by: number) => data[(i + by + data.length) % data.length]!
  const blur = (data: Float32Array, by: number) => data.map((v, i) => 0.5 * v + 0.25 * (near(data, i, -by) + near(data, i, by)))
  const value = blur(blur(sharp, 1), side)
  const rows = new Float64Array(side * side * UNKNOWNS)
  const normal = new Float64Array(UNKNOWNS * UNKNOWNS)
  for (let i = 0; i < value.length; i++) {
    const u = place(i % side) - count / 2
    const v = place((i / side) | 0) - count / 2
    const sx = (near(value, i, 1) - near(value, i, -1)) * (PER_MODULE / 2)
    const sy = (near(value, i, side) - near(value, i, -side)) * (PER_MODULE / 2)
    rows.set([sx, sx * u, sx * v, sy, sy * u, sy * v, value[i]!, 1], i * UNKNOWNS)
    addRow(normal, rows, i, 1)
  }
  return { modules: count, side, value, rows, normal }
}

/** Adds (1) or takes away (-1) what one sample contributes to the normal equations. */
function addRow(normal: Float64Array, rows: Float64Array, sample: number, sign: number): void {
  const from = sample * UNKNOWNS
  for (let i = 0; i < UNKNOWNS; i++) {
    const own = sign * rows[from + i]!
    if (own === 0) continue
    for (let j = 0; j < UNKNOWNS; j++) normal[i * UNKNOWNS + j]! += own * rows[from + j]!
  }
}

/** Correlation (-1 to 1) of the pattern with the picture under `toPhoto` (modules to px); every `stride`th sample. */
export function correlate(grey: Grey, pattern: Pattern, toPhoto: Homography, stride = 1): number {
  let n = 0
  let st = 0
  let stt = 0
  let sp = 0
  let spp = 0
  let stp = 0
  const h = toPhoto
  for (let y = stride >> 1; y < pattern.side; y += stride) {
    const v = place(y)
    for (let x = stride >> 1; x < pattern.side; x += stride) {
      const u = place(x)
      const w = 1 / (h[6]! * u + h[7]! * v + h[8]!)
      const px = (h[0]! * u + h[1]! * v + h[2]!) * w
      const py = (h[3]! * u + h[4]! * v + h[5]!) * w
      if (px < 0 || py < 0 || px > grey.width || py > grey.height) continue
      const p = -brightnessAt(grey, px, py)
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
const STILL_MODULES = 0.008

/** The eight unknowns of one round; null when the picture does not fix them. */
function solveRound(grey: Grey, { side, rows, normal }: Pattern, h: Homography): Float64Array | null {
  const own = Float64Array.from(normal)
  const right = new Float64Array(UNKNOWNS)
  for (let y = 0, sample = 0; y < side; y++) {
    const v = place(y)
    for (let x = 0; x < side; x++, sample++) {
      const u = place(x)
      const w = 1 / (h[6]! * u + h[7]! * v + h[8]!)
      const px = (h[0]! * u + h[1]! * v + h[2]!) * w
      const py = (h[3]! * u + h[4]! * v + h[5]!) * w
      if (!(px >= 1 && py >= 1 && px <= grey.width - 1 && py <= grey.height - 1)) {
        addRow(own, rows, sample, -1)
        continue
      }
      const brightness = brightnessAt(grey, px, py) / 255
      const from = sample * UNKNOWNS
      for (let k = 0; k < UNKNOWNS; k++) right[k]! += rows[from + k]! * brightness
    }
  }
  return solve(own, right)
}

/** Refines modules-to-pixels. Null when it runs away or ends without likeness. Catches about 0.7 of a module. */
export function registerPattern(grey: Grey, pattern: Pattern, start: Homography): Registered | null {
  let toPhoto = start
  const middle = pattern.modules / 2
  let moved = 0
  for (let round = 0; round < ROUNDS; round++) {
    // Unknowns 0 to 5 come multiplied by the contrast (unknown 6).
    const solved = solveRound(grey, pattern, toPhoto)
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

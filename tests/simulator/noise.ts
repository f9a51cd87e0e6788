/** Tables of chance numbers, and smooth noise made of them: made once, read at random offsets. */
import { chanceOf } from './random.ts'

/** The tables are squares of this side. */
export const NOISE_SIDE = 512
const SIZE = NOISE_SIDE * NOISE_SIDE
const chance = chanceOf('noise tables')

/** Averages each value of the square table with its neighbours, across and down, keeping the spread. */
function soften(white: Float32Array): Float32Array {
  const out = new Float32Array(SIZE)
  for (let i = 0; i < SIZE; i += 1) {
    let sum = 2 * white[i]!
    for (const step of [1, -1, NOISE_SIDE, -NOISE_SIDE]) sum += white[(i + step) & (SIZE - 1)]!
    out[i] = sum / Math.sqrt(8)
  }
  return out
}

/** Normally distributed, deviation 1. */
export const WHITE = Float32Array.from({ length: SIZE }, () => chance.normal(0, 1))
/** The same with neighbours alike, as a phone's noise filter leaves it. */
export const SOFT = soften(WHITE)

const LATTICE = 256
const lattice = Float32Array.from({ length: LATTICE * LATTICE }, () => chance.unit())

/** Smooth noise from 0 to 1, one bump a unit. No inner functions: it is called some ten million times a photo. */
export function smoothNoise(x: number, y: number): number {
  const x0 = Math.floor(x)
  const y0 = Math.floor(y)
  const u = x - x0
  const v = y - y0
  const s = u * u * (3 - 2 * u)
  const t = v * v * (3 - 2 * v)
  const row0 = (y0 & 255) * LATTICE
  const row1 = ((y0 + 1) & 255) * LATTICE
  const c0 = x0 & 255
  const c1 = (x0 + 1) & 255
  const top = lattice[row0 + c0]! + s * (lattice[row0 + c1]! - lattice[row0 + c0]!)
  const low = lattice[row1 + c0]! + s * (lattice[row1 + c1]! - lattice[row1 + c0]!)
  return top + t * (low - top)
}

/** Several octaves of it. */
export function roughNoise(x: number, y: number, octaves: number): number {
  let sum = 0
  let weight = 0
  for (let o = 0, w = 1, f = 1; o < octaves; o += 1, w /= 2, f *= 2.03) {
    sum += w * smoothNoise(x * f + 17 * o, y * f - 31 * o)
    weight += w
  }
  return sum / weight
}

/** Light on the scene: falling off to one side, shadows with soft edges, a shine of a lamp. Coarse maps, read smoothly. */
import { smoothNoise } from './noise.ts'
import type { Chance } from './random.ts'

export const LIGHT_CELL = 16

export interface LightPlan {
  /** Brightest to darkest side, as shares of brightness lost. */
  gradient: number
  /** 0 none; share of light a cast shadow takes. */
  shadow: number
  /** Softness of the shadow's edge, share of the picture's width. */
  softness: number
  /** Strength of a shine, 0 to 1. */
  glare: number
  /** Corner darkening of the lens. */
  vignette: number
  /** Brightness of white paper where light is full, 0 to 255. */
  level: number
  /** Red and blue against green. */
  white: readonly [number, number]
}

export interface LightMap {
  columns: number
  rows: number
  /** Factor of brightness, after the eye's curve. */
  gain: Float32Array
  /** Share of white added by shine. */
  shine: Float32Array
}

export function mapLight(plan: LightPlan, width: number, height: number, chance: Chance): LightMap {
  const columns = Math.ceil(width / LIGHT_CELL) + 2
  const rows = Math.ceil(height / LIGHT_CELL) + 2
  const gain = new Float32Array(columns * rows)
  const shine = new Float32Array(columns * rows)
  const direction = chance.between(0, 6.28)
  const [gx, gy] = [Math.cos(direction), Math.sin(direction)]
  const shadowAt = shadowOf(plan, chance)
  const spot = {
    x: chance.between(0.2, 0.8),
    y: chance.between(0.2, 0.8),
    r: chance.between(0.05, 0.11),
    stretch: chance.between(0.6, 1.8),
  }
  const full = plan.level / 255
  for (let r = 0; r < rows; r += 1) {
    for (let c = 0; c < columns; c += 1) {
      const u = c / columns
      const v = r / rows
      const across = ((u - 0.5) * gx + (v - 0.5) * gy) * 1.2 + 0.5
      const corner = (u - 0.5) ** 2 + (v - 0.5) ** 2
      const uneven = 0.06 * (smoothNoise(u * 3 + 7 * gx, v * 3) - 0.5)
      const i = r * columns + c
      gain[i] =
        full *
        Math.max(0.05, 1 - plan.gradient * across + uneven * plan.gradient * 4) *
        (1 - plan.vignette * corner * 2) *
        (1 - shadowAt(u, v))
      const d = ((u - spot.x) / spot.r) ** 2 + ((v - spot.y) / (spot.r * spot.stretch)) ** 2
      shine[i] = plan.glare > 0 ? plan.glare * Math.exp(-d) : 0
    }
  }
  return { columns, rows, gain, shine }
}

/** A straight edge (a cab, a wall), or the head and arms of whoever holds the phone. */
function shadowOf(plan: LightPlan, chance: Chance): (u: number, v: number) => number {
  if (plan.shadow <= 0) return () => 0
  const soft = Math.max(0.004, plan.softness)
  const edge = (distance: number) => plan.shadow / (1 + Math.exp(-distance / (soft / 3)))
  const kind = chance.pick(['edge', 'edge', 'band', 'person'] as const)
  const angle = chance.between(0, 6.28)
  const [nx, ny] = [Math.cos(angle), Math.sin(angle)]
  const at = chance.between(-0.25, 0.25)
  if (kind === 'edge') return (u, v) => edge((u - 0.5) * nx + (v - 0.5) * ny - at)
  if (kind === 'band') {
    const half = chance.between(0.04, 0.14)
    return (u, v) => edge(half - Math.abs((u - 0.5) * nx + (v - 0.5) * ny - at))
  }
  const [hx, hy, r] = [chance.between(0.3, 0.7), chance.between(0.45, 0.7), chance.between(0.16, 0.26)]
  return (u, v) => {
    const head = r - Math.hypot(u - hx, (v - hy) * 1.2)
    const body = Math.min(v - hy - r * 0.9, r * 1.7 - Math.abs(u - hx))
    return edge(Math.max(head, body))
  }
}

/** Dirt on the paper: coffee rings, mud, oily fingers. A coarse layer over the page, 2 dots a millimetre. */
import { roughNoise } from './noise.ts'
import type { Chance } from './random.ts'

export const STAIN_DOTS_PER_MM = 2

export interface Stain {
  width: number
  height: number
  /** Strength, 0 clean to 255. */
  layer: Uint8Array
  /** What is left of red, green and blue at full strength, 0 to 1. */
  tint: readonly [number, number, number]
}

export type Dirt = 'coffee' | 'mud' | 'oil'

const TINTS: Record<Dirt, Stain['tint']> = {
  coffee: [0.74, 0.58, 0.4],
  mud: [0.5, 0.4, 0.3],
  oil: [0.8, 0.78, 0.66],
}

/** Puts some dirt of one kind anywhere on the page. */
export function soil(kind: Dirt, page: { width: number; height: number }, chance: Chance): Stain {
  const width = Math.ceil(page.width * STAIN_DOTS_PER_MM) + 2
  const height = Math.ceil(page.height * STAIN_DOTS_PER_MM) + 2
  const layer = new Uint8Array(width * height)
  const add = (x: number, y: number, radius: number, ring: boolean, strength: number) => {
    const [cx, cy, r] = [x * STAIN_DOTS_PER_MM, y * STAIN_DOTS_PER_MM, radius * STAIN_DOTS_PER_MM]
    const offset = chance.between(0, 99)
    for (let v = Math.max(0, Math.floor(cy - 1.5 * r)); v < Math.min(height, cy + 1.5 * r); v += 1) {
      for (let u = Math.max(0, Math.floor(cx - 1.5 * r)); u < Math.min(width, cx + 1.5 * r); u += 1) {
        const wobble = 1 + 0.25 * (roughNoise(u / 30 + offset, v / 30, 3) - 0.5)
        const d = Math.hypot(u - cx, v - cy) / (r * wobble)
        const body = ring ? Math.exp(-(((d - 1) / 0.05) ** 2)) + (d < 1 ? 0.16 : 0) : 1 / (1 + Math.exp((d - 0.9) * 18))
        const value = 255 * strength * Math.min(1, body) * (0.7 + 0.6 * (roughNoise(u / 9 + offset, v / 9, 2) - 0.5))
        const i = v * width + u
        layer[i] = Math.min(255, layer[i]! + Math.max(0, value))
      }
    }
  }
  const anywhere = () => [chance.between(10, page.width - 10), chance.between(20, page.height - 20)] as const
  if (kind === 'coffee') add(...anywhere(), chance.between(34, 42), true, chance.between(0.5, 0.9))
  const drops = kind === 'coffee' ? chance.whole(0, 4) : kind === 'mud' ? chance.whole(6, 24) : chance.whole(2, 5)
  for (let i = 0; i < drops; i += 1) {
    const size = kind === 'oil' ? chance.between(6, 11) : chance.between(0.4, kind === 'mud' ? 3.2 : 2.2)
    add(...anywhere(), size, false, kind === 'oil' ? chance.between(0.2, 0.5) : chance.between(0.4, 0.9))
  }
  return { width, height, layer, tint: TINTS[kind] }
}

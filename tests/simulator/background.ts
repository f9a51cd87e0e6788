/** What the sheet lies on: wood, soil, a dark seat, a bright table. Made small and enlarged: it is out of focus anyway. */
import { roughNoise, smoothNoise } from './noise.ts'
import type { Chance } from './random.ts'

export const GROUNDS = ['wood', 'soil', 'dark', 'bright', 'metal', 'cloth'] as const
export type Ground = (typeof GROUNDS)[number]

/** RGB, 0 to 255, of a ground `width` by `height`. */
export function makeGround(kind: Ground, width: number, height: number, chance: Chance): Uint8Array {
  const out = new Uint8Array(width * height * 3)
  const tint = TINTS[kind]
  const [ox, oy] = [chance.between(0, 200), chance.between(0, 200)]
  const angle = chance.between(0, 3.14)
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)]
  const zoom = chance.between(0.7, 1.4) * (400 / Math.max(width, height))
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += 1) {
      const u = (x * cos - y * sin) * zoom
      const v = (x * sin + y * cos) * zoom
      const shade = PATTERNS[kind](u + ox, v + oy)
      const i = 3 * (y * width + x)
      for (let c = 0; c < 3; c += 1)
        out[i + c] = Math.max(0, Math.min(255, tint.dark[c]! + shade * (tint.light[c]! - tint.dark[c]!)))
    }
  }
  return out
}

const TINTS: Record<Ground, { dark: number[]; light: number[] }> = {
  wood: { dark: [92, 66, 46], light: [186, 148, 108] },
  soil: { dark: [66, 52, 42], light: [158, 132, 106] },
  dark: { dark: [26, 26, 28], light: [78, 76, 76] },
  bright: { dark: [186, 186, 182], light: [232, 232, 228] },
  metal: { dark: [104, 64, 34], light: [206, 128, 58] },
  cloth: { dark: [40, 54, 84], light: [104, 122, 150] },
}

const PATTERNS: Record<Ground, (u: number, v: number) => number> = {
  wood: (u, v) => {
    const rings = smoothNoise(u / 90, v / 6) * 6 + roughNoise(u / 40, v / 3, 3) * 2
    const plank = ((v % 70) + 70) % 70 < 0.9 ? 0.5 : 0
    return Math.max(0, 0.5 + 0.3 * Math.sin(rings * 3) + 0.25 * (roughNoise(u / 3, v, 2) - 0.5) - plank)
  },
  soil: (u, v) => {
    const clods = roughNoise(u / 14, v / 14, 5)
    return Math.max(0, Math.min(1, (clods - 0.28) * 2 + 0.3 * (smoothNoise(u / 1.1, v / 1.1) - 0.5)))
  },
  dark: (u, v) => 0.5 * roughNoise(u / 60, v / 60, 3) + 0.3 * smoothNoise(u / 1.3, v / 1.3),
  bright: (u, v) => 0.4 + 0.5 * roughNoise(u / 120, v / 120, 3),
  metal: (u, v) => 0.35 + 0.6 * roughNoise(u / 150, v / 20, 3) - (roughNoise(u / 9, v / 9, 3) > 0.68 ? 0.35 : 0),
  cloth: (u, v) => 0.35 + 0.25 * Math.sin(u * 2.6) * Math.sin(v * 2.6) + 0.4 * (roughNoise(u / 40, v / 40, 3) - 0.2),
}

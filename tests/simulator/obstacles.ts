/** What covers a part of the page in the picture: a thumb that holds it, a corner folded over. */
import type { Camera } from './camera.ts'
import type { Chance } from './random.ts'
import type { Picture } from './raster.ts'
import type { Surface } from './surface.ts'

type Page = { width: number; height: number }

const CORNERS = [
  [0, 0],
  [1, 0],
  [1, 1],
  [0, 1],
] as const

/** A thumb from outside over an edge or a corner of the page. */
export function holdWithThumb(picture: Picture, camera: Camera, surface: Surface, page: Page, chance: Chance): void {
  const [u, v] = chance.odds(0.6) ? chance.pick(CORNERS) : ([chance.pick([0, 1]), chance.between(0.3, 0.7)] as const)
  const tip_mm = [
    u * page.width + (u ? -1 : 1) * chance.between(5, 16),
    v * page.height + (v > 0.5 ? -1 : 1) * chance.between(0, 12),
  ] as const
  const tip = camera.project(surface.at(tip_mm[0], tip_mm[1]))
  const root = camera.project(surface.at(tip_mm[0] + (u ? 60 : -60), tip_mm[1] + chance.between(-10, 40)))
  const mm = Math.hypot(root[0] - tip[0], root[1] - tip[1]) / 65
  const half = 9.5 * mm
  const skin = chance.pick([
    [214, 170, 140],
    [164, 116, 86],
    [110, 76, 56],
  ] as const)
  const [dx, dy] = [(root[0] - tip[0]) / (65 * mm), (root[1] - tip[1]) / (65 * mm)]
  const reach = 90 * mm
  for (let y = Math.max(0, Math.floor(tip[1] - reach)); y < Math.min(picture.height, tip[1] + reach); y += 1) {
    for (let x = Math.max(0, Math.floor(tip[0] - reach)); x < Math.min(picture.width, tip[0] + reach); x += 1) {
      const along = (x - tip[0]) * dx + (y - tip[1]) * dy
      const across = -(x - tip[0]) * dy + (y - tip[1]) * dx
      const round = along < half ? Math.sqrt(Math.max(0, 1 - ((half - along) / half) ** 2)) : 1
      const edge = Math.abs(across) / (half * (0.25 + 0.75 * round))
      if (along < 0 || edge > 1) continue
      const nail = along > 0.25 * half && along < 1.5 * half && Math.abs(across) < 0.55 * half ? 1.1 : 1
      const shade = (1 - 0.45 * edge * edge) * nail
      const i = 3 * (y * picture.width + x)
      for (let c = 0; c < 3; c += 1) picture.rgb[i + c] = Math.min(255, skin[c]! * shade)
    }
  }
}

/** A corner of the page that is gone: torn off, or turned over. Legs along the page's edges, mm. */
export interface LostCorner {
  corner: 0 | 1 | 2 | 3
  legs: readonly [number, number]
  folded: boolean
}

/** Half plane of page dots that is gone: p * u + q * v + r < 0. */
export function lostPart({ corner, legs }: LostCorner, page: Page, dotsPerMm: number): readonly [number, number, number] {
  const [right, low] = CORNERS[corner]
  const [a, b] = [legs[0] * dotsPerMm, legs[1] * dotsPerMm]
  const p = (right ? -1 : 1) / a
  const q = (low ? -1 : 1) / b
  return [p, q, (right ? (page.width * dotsPerMm) / a : 0) + (low ? (page.height * dotsPerMm) / b : 0) - 1]
}

/** Draws the bare back of a corner turned over: the missing triangle mirrored on the fold. */
export function drawFlap(picture: Picture, camera: Camera, surface: Surface, page: Page, lost: LostCorner): void {
  const [right, low] = CORNERS[lost.corner]
  const [a, b] = lost.legs
  const at = (x: number, y: number) => camera.project(surface.at(right ? page.width - x : x, low ? page.height - y : y))
  const steps = 200
  for (let i = 0; i <= steps; i += 1) {
    for (let k = 0; k <= steps - i; k += 1) {
      const [s, t] = [i / steps, k / steps]
      const inward = 1 - s - t
      const x = a * s + (2 * inward * a * b * b) / (a * a + b * b)
      const y = b * t + (2 * inward * a * a * b) / (a * a + b * b)
      dab(picture, at(x, y), 224 - 34 * (1 - inward) ** 6)
    }
  }
}

function dab(picture: Picture, [x, y]: readonly [number, number], tone: number): void {
  for (let v = Math.round(y) - 3; v <= Math.round(y) + 3; v += 1) {
    for (let u = Math.round(x) - 3; u <= Math.round(x) + 3; u += 1) {
      if (u < 0 || v < 0 || u >= picture.width || v >= picture.height) continue
      const i = 3 * (v * picture.width + u)
      picture.rgb[i] = tone
      picture.rgb[i + 1] = tone
      picture.rgb[i + 2] = tone * 0.97
    }
  }
}

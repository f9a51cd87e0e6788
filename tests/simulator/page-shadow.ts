/** The soft shadow a sheet throws on what it lies on; without it the page looks pasted in. */
import type { Camera } from './camera.ts'
import type { Chance } from './random.ts'
import type { Picture } from './raster.ts'
import type { Surface } from './surface.ts'

const CELL = 8

/** Darkens the ground around the page, before the page is drawn over it. */
export function castShadow(
  picture: Picture,
  surface: Surface,
  camera: Camera,
  page: { width: number; height: number },
  chance: Chance,
): void {
  const [w, h] = [Math.ceil(picture.width / CELL) + 1, Math.ceil(picture.height / CELL) + 1]
  const mask = new Float32Array(w * h)
  const [dx, dy] = [chance.normal(0, 3), chance.normal(0, 3)]
  for (let y = 0; y <= page.height; y += 0.6) {
    for (let x = 0; x <= page.width; x += 0.6) {
      const [px, py] = camera.project(surface.at(x, y))
      const [u, v] = [Math.round(px / CELL + dx), Math.round(py / CELL + dy)]
      if (u >= 0 && v >= 0 && u < w && v < h) mask[v * w + u] = 1
    }
  }
  const soft = blur(blur(mask, w, h, 4), w, h, 4)
  const depth = chance.between(0.25, 0.55)
  for (let y = 0; y < picture.height; y += 1) {
    for (let x = 0; x < picture.width; x += 1) {
      const shade = soft[Math.floor(y / CELL) * w + Math.floor(x / CELL)]!
      if (shade < 0.02) continue
      const i = 3 * (y * picture.width + x)
      for (let c = 0; c < 3; c += 1) picture.rgb[i + c] = picture.rgb[i + c]! * (1 - depth * shade)
    }
  }
}

/** Mean over a square window of 2 * reach + 1. */
function blur(source: Float32Array, w: number, h: number, reach: number): Float32Array {
  const across = new Float32Array(w * h)
  const out = new Float32Array(w * h)
  const size = 2 * reach + 1
  for (let y = 0; y < h; y += 1) {
    for (let x = 0; x < w; x += 1) {
      let sum = 0
      for (let k = -reach; k <= reach; k += 1) sum += source[y * w + Math.min(w - 1, Math.max(0, x + k))]!
      across[y * w + x] = sum / size
    }
  }
  for (let y = 0; y < h; y += 1) {
    for (let x = 0; x < w; x += 1) {
      let sum = 0
      for (let k = -reach; k <= reach; k += 1) sum += across[Math.min(h - 1, Math.max(0, y + k)) * w + x]!
      out[y * w + x] = sum / size
    }
  }
  return out
}

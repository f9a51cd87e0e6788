/** Light that a condition adds to the ordinary one: the shadow of the phone and its hands, and lamps of two colours. */
import { LIGHT_CELL, type LightMap } from '../light.ts'
import type { Chance } from '../random.ts'
import type { Picture } from '../raster.ts'

/** The shadow of a phone held over the sheet, light coming from behind the shoulder: a box with soft sides, and an arm to it. */
export function shadeByPhone(map: LightMap, depth: number, chance: Chance): void {
  const [x, y] = [chance.between(0.35, 0.65), chance.between(0.4, 0.7)]
  const [halfWidth, halfHeight] = [chance.between(0.12, 0.2), chance.between(0.1, 0.16)]
  const turn = chance.normal(0, 0.3)
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)]
  const soft = chance.between(0.008, 0.03)
  const arm = chance.between(0.06, 0.1)
  for (let r = 0; r < map.rows; r += 1) {
    for (let c = 0; c < map.columns; c += 1) {
      const [dx, dy] = [c / map.columns - x, r / map.rows - y]
      const [u, v] = [dx * cos + dy * sin, dy * cos - dx * sin]
      const phone = Math.min(halfWidth - Math.abs(u), halfHeight - Math.abs(v))
      const hand = Math.min(arm - Math.abs(u - halfWidth * 0.8), v)
      const inside = 1 / (1 + Math.exp(-Math.max(phone, hand) / soft))
      map.gain[r * map.columns + c]! *= 1 - depth * inside
    }
  }
}

/** A window mirrored on glossy paper: nothing is left of the print within. `side`: of the picture's width. */
export function mirrorWindow(map: LightMap, side: number, chance: Chance): void {
  const [x, y] = [chance.between(0.35, 0.65), chance.between(0.35, 0.65)]
  const soft = 0.015
  for (let r = 0; r < map.rows; r += 1) {
    for (let c = 0; c < map.columns; c += 1) {
      const outside = Math.max(Math.abs(c / map.columns - x), Math.abs(r / map.rows - y)) - side / 2
      const strength = 1 / (1 + Math.exp(outside / soft))
      const i = r * map.columns + c
      map.shine[i] = Math.max(map.shine[i]!, strength)
    }
  }
}

/** Daylight from one side and a warm lamp from the other, in place. `strength`: red and blue against green at either side. */
export function mixLamps({ width, height, rgb }: Picture, strength: number, chance: Chance): void {
  const direction = chance.between(0, 6.28)
  const [gx, gy] = [Math.cos(direction), Math.sin(direction)]
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += LIGHT_CELL) {
      const across = ((x / width - 0.5) * gx + (y / height - 0.5) * gy) * 2
      const warm = strength * Math.tanh(2 * across)
      const end = 3 * (y * width + Math.min(width, x + LIGHT_CELL))
      for (let i = 3 * (y * width + x); i < end; i += 3) {
        rgb[i] = Math.min(255, rgb[i]! * (1 + warm))
        rgb[i + 2] = Math.min(255, rgb[i + 2]! * (1 - warm))
      }
    }
  }
}

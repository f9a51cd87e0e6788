/** From the scene to the file: light, blur, grain, the phone's sharpening, JPEG. */
import sharp from 'sharp'
import { LIGHT_CELL, type LightMap } from './light.ts'
import { NOISE_SIDE, SOFT, WHITE } from './noise.ts'
import type { Chance } from './random.ts'
import type { Picture } from './raster.ts'

export interface Optics {
  /** Gaussian blur of focus, pixels. */
  defocus_px: number
  /** Length and direction of a shake. */
  shake_px: number
  shakeAngle: number
  /** Grain at mid grey, levels of 255. */
  grain: number
  /** Sharpening strength of the phone, 0 none. */
  sharpen: number
  jpegQuality: number
  /** Stored lying, with a tag that says so, as phones held upright store their pictures. */
  storedLying: boolean
}

/** Multiplies by the light, in place. */
export function shine(picture: Picture, light: LightMap, white: readonly [number, number]): void {
  const { width, height, rgb } = picture
  const gainRow = new Float32Array(light.columns)
  const shineRow = new Float32Array(light.columns)
  for (let y = 0; y < height; y += 1) {
    const fy = y / LIGHT_CELL
    const r = Math.floor(fy) * light.columns
    const t = fy - Math.floor(fy)
    for (let c = 0; c < light.columns; c += 1) {
      const below = r + c + light.columns
      gainRow[c] = light.gain[r + c]! + t * (light.gain[below]! - light.gain[r + c]!)
      shineRow[c] = light.shine[r + c]! + t * (light.shine[below]! - light.shine[r + c]!)
    }
    let i = 3 * y * width
    for (let x = 0; x < width; x += 1, i += 3) {
      const c = x >> 4
      const s = (x & 15) / LIGHT_CELL
      const gain = gainRow[c]! + s * (gainRow[c + 1]! - gainRow[c]!)
      const glow = shineRow[c]! + s * (shineRow[c + 1]! - shineRow[c]!)
      const [red, green, blue] = [rgb[i]! * gain * white[0], rgb[i + 1]! * gain, rgb[i + 2]! * gain * white[1]]
      rgb[i] = Math.min(255, red + (255 - red) * glow)
      rgb[i + 1] = Math.min(255, green + (255 - green) * glow)
      rgb[i + 2] = Math.min(255, blue + (255 - blue) * glow)
    }
  }
}

/** Weights of a straight shake as a square kernel, or null when it is under half a pixel. */
export function shakeKernel(length: number, angle: number): { side: number; weights: number[] } | null {
  if (length < 0.5) return null
  const side = 2 * Math.ceil(length / 2) + 1
  const weights = new Array<number>(side * side).fill(0)
  const middle = (side - 1) / 2
  const steps = 40
  for (let i = 0; i < steps; i += 1) {
    const d = (i / (steps - 1) - 0.5) * length
    const x = middle + d * Math.cos(angle)
    const y = middle + d * Math.sin(angle)
    const [x0, y0] = [Math.floor(x), Math.floor(y)]
    for (const [dx, dy] of [
      [0, 0],
      [1, 0],
      [0, 1],
      [1, 1],
    ] as const) {
      const w = (dx ? x - x0 : 1 - x + x0) * (dy ? y - y0 : 1 - y + y0)
      const k = (y0 + dy) * side + x0 + dx
      if (w > 0 && k < weights.length) weights[k]! += w
    }
  }
  return { side, weights }
}

/** Grain is stronger where it is bright, alike among neighbours, and a little different in each colour. */
function addGrain(rgb: Uint8Array, width: number, grain: number, chance: Chance): void {
  if (grain <= 0) return
  const mask = NOISE_SIDE - 1
  const height = rgb.length / 3 / width
  const [ox, oy] = [chance.whole(0, mask), chance.whole(0, mask)]
  // Two tables repeat every 512 dots; a shift that grows from tile to tile keeps the eye from seeing it.
  for (let y = 0; y < height; y += 1) {
    const drift = (y >> 9) * 173
    const fine = ((y + oy) & mask) * NOISE_SIDE
    const soft = ((y + 3 * oy + 101) & mask) * NOISE_SIDE
    let i = 3 * y * width
    for (let x = 0; x < width; x += 1, i += 3) {
      const column = x + drift + (x >> 9) * 59
      const strength = grain * (0.55 + rgb[i + 1]! / 280)
      const k = soft + ((column + 2 * ox) & mask)
      const luma = strength * (0.5 * WHITE[fine + ((column + ox) & mask)]! + 0.75 * SOFT[k]!)
      const tint = 0.35 * strength
      put(rgb, i, luma + tint * SOFT[(k + 40_009) & LAST]!)
      put(rgb, i + 1, luma)
      put(rgb, i + 2, luma + tint * SOFT[(k + 90_017) & LAST]!)
    }
  }
}

const LAST = NOISE_SIDE * NOISE_SIDE - 1

function put(rgb: Uint8Array, i: number, add: number): void {
  const value = rgb[i]! + add
  rgb[i] = value < 0 ? 0 : value > 255 ? 255 : value + 0.5
}

/** Blurs, grains, sharpens and compresses. */
export async function develop(picture: Picture, optics: Optics, chance: Chance): Promise<Buffer> {
  const raw = { width: picture.width, height: picture.height, channels: 3 as const }
  let image = sharp(picture.rgb, { raw })
  if (optics.defocus_px > 0.3) image = image.blur(optics.defocus_px)
  const kernel = shakeKernel(optics.shake_px, optics.shakeAngle)
  if (kernel) image = image.convolve({ width: kernel.side, height: kernel.side, kernel: kernel.weights })
  const { data } = await image.raw().toBuffer({ resolveWithObject: true })
  addGrain(data, picture.width, optics.grain, chance)
  let out = sharp(data, { raw })
  if (optics.sharpen > 0) out = out.sharpen({ sigma: 1, m1: optics.sharpen * 0.5, m2: optics.sharpen })
  if (optics.storedLying) out = out.rotate(-90).withMetadata({ orientation: 6 })
  return out.jpeg({ quality: optics.jpegQuality, chromaSubsampling: '4:2:0' }).toBuffer()
}

/** From the scene to the file: light, blur, grain, the phone's sharpening, JPEG. */
import sharp from 'sharp'
import { LIGHT_CELL, type LightMap } from './light.ts'
import { NOISE_MASK, SOFT, WHITE } from './noise.ts'
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

function addGrain(rgb: Uint8Array, width: number, grain: number, chance: Chance): void {
  if (grain <= 0) return
  let at = chance.whole(0, NOISE_MASK)
  for (let i = 0; i < rgb.length; i += 3) {
    if (i % (3 * width) === 0) at = chance.whole(0, NOISE_MASK)
    const k = (at + i / 3) & NOISE_MASK
    const level = rgb[i + 1]!
    const strength = grain * (0.55 + level / 280)
    const luma = strength * (0.5 * WHITE[k]! + 0.75 * SOFT[(k * 3 + 11) & NOISE_MASK]!)
    for (let c = 0; c < 3; c += 1) {
      const value = rgb[i + c]! + luma + 0.35 * strength * SOFT[(k + 7919 * (c + 1)) & NOISE_MASK]!
      rgb[i + c] = value < 0 ? 0 : Math.min(value, 255)
    }
  }
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
  return out.jpeg({ quality: optics.jpegQuality, chromaSubsampling: '4:2:0' }).toBuffer()
}

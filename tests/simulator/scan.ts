/** A flat scan instead of a photo: even light, a little askew, sometimes the copy of a copy. */
import sharp from 'sharp'
import type { Camera } from './camera.ts'
import { WHITE } from './noise.ts'
import type { Paper } from './paper.ts'
import type { Chance } from './random.ts'
import { drawPage, type Picture } from './raster.ts'
import type { Surface } from './surface.ts'

export interface ScanPlan {
  dpi: number
  grey: boolean
  /** Radians. */
  skew: number
  /** 1 = true size; copiers shrink and stretch by about a hundredth. */
  scale: number
  /** A photocopy: harder contrast, specks, thinned or thickened lines. */
  copied: boolean
  /** How much harder the copy is than its original, 1 = alike. */
  contrast: number
  jpegQuality: number
}

export function drawScanPlan(chance: Chance): ScanPlan {
  return {
    dpi: chance.pick([200, 300]),
    grey: chance.odds(0.6),
    skew: chance.normal(0, 0.012),
    scale: chance.odds(0.3) ? chance.between(0.97, 1.01) : 1,
    copied: chance.odds(0.25),
    contrast: chance.between(1.1, 1.5),
    jpegQuality: chance.whole(70, 92),
  }
}

export const FLAT: Surface = { at: (x, y) => [x, y, 0], slope: () => 0, angle: 0 }

/** The scanner sees straight down: a turn and a scale, the page's middle in the middle of the bed. */
export function scannerOver(plan: ScanPlan, page: { width: number; height: number }): Camera & { width: number; height: number } {
  const perMm = (plan.dpi / 25.4) * plan.scale
  const width = Math.round((page.width + 4) * (plan.dpi / 25.4))
  const height = Math.round((page.height + 4) * (plan.dpi / 25.4))
  const [cos, sin] = [Math.cos(plan.skew) * perMm, Math.sin(plan.skew) * perMm]
  return {
    width,
    height,
    project: ([x, y]) => {
      const [u, v] = [x - page.width / 2, y - page.height / 2]
      return [width / 2 + u * cos - v * sin, height / 2 + u * sin + v * cos]
    },
  }
}

/** Scans the written page. */
export async function scan(
  plan: ScanPlan,
  paper: Paper,
  page: { width: number; height: number },
  chance: Chance,
): Promise<{ jpeg: Buffer; camera: Camera }> {
  const camera = scannerOver(plan, page)
  const picture: Picture = {
    width: camera.width,
    height: camera.height,
    rgb: new Uint8Array(camera.width * camera.height * 3).fill(plan.copied ? 236 : 250),
  }
  drawPage(picture, paper, FLAT, camera, page, 0, 0)
  addSpecks(picture, plan, chance)
  let image = sharp(picture.rgb, { raw: { width: picture.width, height: picture.height, channels: 3 } }).blur(
    0.3 + 0.35 * chance.unit(),
  )
  if (plan.copied) image = image.linear(plan.contrast, 150 * (1 - plan.contrast))
  if (plan.grey) image = image.grayscale()
  return { jpeg: await image.withMetadata({ density: plan.dpi }).jpeg({ quality: plan.jpegQuality }).toBuffer(), camera }
}

/** Sensor grain everywhere, and on a copy black specks and dropped spots. */
function addSpecks({ rgb, width, height }: Picture, plan: ScanPlan, chance: Chance): void {
  for (let i = 0; i < rgb.length; i += 3) {
    const grain = 2 * WHITE[(i / 3) % WHITE.length]!
    for (let c = 0; c < 3; c += 1) rgb[i + c] = Math.max(0, Math.min(255, rgb[i + c]! + grain))
  }
  const specks = plan.copied ? chance.whole(150, 900) : 0
  for (let n = 0; n < specks; n += 1) {
    const size = chance.whole(1, 2)
    const tone = chance.odds(0.75) ? chance.whole(20, 120) : 250
    const [x0, y0] = [chance.whole(2, width - 4), chance.whole(2, height - 4)]
    for (let y = y0; y < y0 + size; y += 1)
      for (let x = x0; x < x0 + size; x += 1) rgb.fill(tone, 3 * (y * width + x), 3 * (y * width + x) + 3)
  }
}

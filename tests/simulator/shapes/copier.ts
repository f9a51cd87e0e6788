/** What a scanner or a copier makes of a page: flat, a little askew, and where copied harder, specked, or black and white only. */
import sharp from 'sharp'
import type { Camera } from '../camera.ts'
import type { Paper } from '../paper.ts'
import type { Chance } from '../random.ts'
import { scan, scannerOver } from '../scan.ts'
import type { Range, Scanner } from './condition.ts'

const draw = (chance: Chance, [low, high]: Range) => chance.between(low, high)

/** @param page the sheet of paper, mm */
export async function scanPaper(
  scanner: Scanner,
  paper: Paper,
  page: { width: number; height: number },
  chance: Chance,
): Promise<{ jpeg: Buffer; camera: Camera }> {
  const { copier } = scanner
  const plan = {
    dpi: scanner.dpi,
    grey: scanner.grey,
    skew: chance.normal(0, 0.012),
    scale: draw(chance, scanner.scale),
    copied: copier !== undefined && !copier.blackAndWhite,
    contrast: copier ? draw(chance, copier.contrast) : 1,
    jpegQuality: copier?.blackAndWhite ? 95 : chance.whole(70, 90),
  }
  const scanned = await scan(plan, paper, page, chance.fork('scan'))
  const { width, height } = scannerOver(plan, page)
  if (!copier) return scanned
  const { data } = await sharp(scanned.jpeg).grayscale().raw().toBuffer({ resolveWithObject: true })
  if (copier.blackAndWhite) threshold(data, chance.between(150, 200))
  speck(data, width, Math.round(draw(chance, copier.specks)), chance.fork('specks'))
  const jpeg = await sharp(data, { raw: { width, height, channels: 1 } })
    .blur(0.5)
    .withMetadata({ density: scanner.dpi })
    .jpeg({ quality: chance.whole(70, 90) })
    .toBuffer()
  return { ...scanned, jpeg }
}

/** Black and white, with the little unevenness of toner at each edge. */
function threshold(grey: Uint8Array, at: number): void {
  for (let i = 0; i < grey.length; i += 1) grey[i] = grey[i]! < at ? 24 : 250
}

/** Black specks, most of them smaller than a point, and some dropped spots. */
function speck(grey: Uint8Array, width: number, count: number, chance: Chance): void {
  const height = grey.length / width
  for (let n = 0; n < count; n += 1) {
    const size = chance.whole(1, chance.odds(0.1) ? 5 : 2)
    const tone = chance.odds(0.8) ? 30 : 250
    const [x0, y0] = [chance.whole(0, width - size - 1), chance.whole(0, height - size - 1)]
    for (let y = y0; y < y0 + size; y += 1) grey.fill(tone, y * width + x0, y * width + x0 + size)
  }
}

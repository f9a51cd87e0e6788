/** Photographs or scans the paper under a condition. */
import sharp from 'sharp'
import { makeGround } from '../background.ts'
import { aim, type Camera } from '../camera.ts'
import { develop, shine } from '../develop.ts'
import { type Conditions, drawConditions } from '../levels.ts'
import { mapLight } from '../light.ts'
import { drawFlap, holdWithThumb, type LostCorner, lostPart } from '../obstacles.ts'
import { castShadow } from '../page-shadow.ts'
import type { Chance } from '../random.ts'
import { drawPage, type Picture } from '../raster.ts'
import type { Surface } from '../surface.ts'
import type { Condition, Range } from './condition.ts'
import { scanPaper } from './copier.ts'
import { shapeSheet } from './form.ts'
import { mirrorWindow, mixLamps, shadeByPhone } from './light-parts.ts'
import type { Reprint } from './reprint.ts'

export interface Taken {
  jpeg: Buffer
  /** Pixels of a point of the print, in mm of the layout. */
  place(x_mm: number, y_mm: number): readonly [number, number]
}

const draw = (range: Range | undefined, otherwise: number, chance: Chance) =>
  range ? chance.between(range[0], range[1]) : otherwise

/** An ordinary photo with what the condition asks for; nothing else that could spoil it. */
function drawOrdinary(condition: Condition, chance: Chance): Conditions {
  const base = drawConditions('ordinary', chance.fork('base'))
  const own = chance.fork('own')
  const { shot, light, optics } = condition
  const direction = own.between(0, 6.28)
  const tilt = draw(shot?.tilt, 0, own)
  return {
    ...base,
    shot: {
      ...base.shot,
      ...(shot?.tilt ? { pitch: tilt * Math.cos(direction), yaw: tilt * Math.sin(direction) } : {}),
      fill: draw(shot?.fill, base.shot.fill, own),
      off: shot?.off ? [draw(shot.off, 0, own) * (own.odds(0.5) ? 1 : -1), 0] : base.shot.off,
    },
    light: {
      ...base.light,
      level: draw(light?.level, base.light.level, own),
      gradient: draw(light?.gradient, base.light.gradient, own),
      glare: draw(light?.glare, 0, own),
      shadow: light ? 0 : base.light.shadow,
    },
    optics: {
      ...base.optics,
      defocus_px: draw(optics?.defocus_px, base.optics.defocus_px, own),
      shake_px: draw(optics?.shake_px, base.optics.shake_px, own),
      grain: draw(optics?.grain, base.optics.grain, own),
      jpegQuality: Math.round(draw(optics?.jpegQuality, base.optics.jpegQuality, own)),
    },
  }
}

/** @param page the sheet of paper, in mm of the print */
export async function takePicture(
  condition: Condition,
  joined: (coarse: boolean) => Reprint,
  page: { width: number; height: number },
  chance: Chance,
): Promise<Taken> {
  const scale = condition.print?.scale ?? 1
  if (condition.scanner) {
    const { paper, left, top } = joined(condition.scanner.dpi < 250)
    const [low, high] = condition.scanner.scale
    const scanner = { ...condition.scanner, scale: [low * scale, high * scale] as const }
    const { jpeg, camera } = await scanPaper(scanner, paper, page, chance.fork('scanner'))
    return { jpeg, place: (x, y) => camera.project([x + left, y + top, 0]) }
  }
  const drawn = drawOrdinary(condition, chance.fork('conditions'))
  const surface = shapeSheet(condition.form, drawn.curl_mm, page, chance.fork('form'))
  const camera = aim(drawn.shot, surface, page)
  const { paper, left, top } = joined(pixelsPerMm(camera, surface, page) < 8)
  const lost = drawLost(condition, chance.fork('lost'))
  if (lost) paper.lost = lostPart(lost, page, paper.dotsPerMm)

  const picture = await layGround(drawn, chance.fork('ground'))
  castShadow(picture, surface, camera, page, chance.fork('page shadow'))
  drawPage(picture, paper, surface, camera, page, drawn.lean, chance.between(0, 6.28))
  if (lost?.folded) drawFlap(picture, camera, surface, page, lost)
  if (condition.thumb) holdWithThumb(picture, camera, surface, page, chance.fork('thumb'))
  const light = mapLight(drawn.light, picture.width, picture.height, chance.fork('light'))
  const lamps = chance.fork('lamps')
  if (condition.light?.phone) shadeByPhone(light, draw(condition.light.phone, 0, lamps), lamps)
  if (condition.light?.window) mirrorWindow(light, draw(condition.light.window, 0, lamps), lamps)
  shine(picture, light, drawn.light.white)
  if (condition.light?.mixed) mixLamps(picture, draw(condition.light.mixed, 0, lamps), lamps)
  const jpeg = await develop(picture, drawn.optics, chance.fork('grain'))
  return { jpeg, place: (x, y) => camera.project(surface.at(x + left, y + top)) }
}

function drawLost({ lost }: Condition, chance: Chance): LostCorner | null {
  if (!lost) return null
  const leg = () => chance.between(lost.legs_mm[0], lost.legs_mm[1])
  return { corner: chance.pick([0, 1, 2, 3] as const), legs: [leg(), leg()], folded: lost.folded }
}

function pixelsPerMm(camera: Camera, surface: Surface, page: { width: number; height: number }): number {
  const [x, y] = [page.width / 2, page.height / 2]
  const [a, b] = [camera.project(surface.at(x - 5, y)), camera.project(surface.at(x + 5, y))]
  return Math.hypot(a[0] - b[0], a[1] - b[1]) / 10
}

/** What it lies on is out of focus anyway: made small and enlarged. */
async function layGround({ ground, shot }: Conditions, chance: Chance): Promise<Picture> {
  const [w, h] = [shot.width >> 2, shot.height >> 2]
  const rgb = await sharp(makeGround(ground, w, h, chance), { raw: { width: w, height: h, channels: 3 } })
    .resize(shot.width, shot.height, { kernel: 'linear' })
    .raw()
    .toBuffer()
  return { width: shot.width, height: shot.height, rgb: new Uint8Array(rgb.buffer, rgb.byteOffset, rgb.byteLength) }
}

/** Takes a photo of a written page, or of the bare ground. */
import sharp from 'sharp'
import type { Layout } from '../../shared/layouts/layout.ts'
import { type Ground, makeGround } from './background.ts'
import { aim, type Camera } from './camera.ts'
import { develop, shine } from './develop.ts'
import { type Conditions, drawConditions } from './levels.ts'
import { mapLight } from './light.ts'
import { drawFlap, holdWithThumb } from './obstacles.ts'
import { castShadow } from './page-shadow.ts'
import type { Paper } from './paper.ts'
import type { Chance } from './random.ts'
import { drawPage, type Picture } from './raster.ts'
import { bendSheet, drawBend, type Surface } from './surface.ts'

/** @param joined the written page, at 150 dots an inch where asked to be coarse */
export async function photograph(conditions: Conditions, joined: (coarse: boolean) => Paper, layout: Layout, chance: Chance) {
  const { page } = layout
  const surface = bendSheet(drawBend(chance.fork('bend'), conditions.curl_mm), page)
  const camera = aim(conditions.shot, surface, page)
  const paper = joined(pixelsPerMm(camera, surface, layout) < 8)
  const picture = await layGround(conditions, chance.fork('ground'))
  castShadow(picture, surface, camera, page, chance.fork('page shadow'))
  drawPage(picture, paper, surface, camera, page, conditions.lean, chance.between(0, 6.28))
  if (conditions.lost?.folded) drawFlap(picture, camera, surface, page, conditions.lost)
  if (conditions.thumb) holdWithThumb(picture, camera, surface, page, chance.fork('thumb'))
  shine(picture, mapLight(conditions.light, picture.width, picture.height, chance.fork('light')), conditions.light.white)
  return { jpeg: await develop(picture, conditions.optics, chance.fork('grain')), camera, surface }
}

function pixelsPerMm(camera: Camera, surface: Surface, layout: Layout): number {
  const [x, y] = [layout.page.width / 2, layout.page.height / 2]
  const [a, b] = [camera.project(surface.at(x - 5, y - 5)), camera.project(surface.at(x + 5, y + 5))]
  return Math.hypot(a[0] - b[0], a[1] - b[1]) / Math.hypot(10, 10)
}

async function layGround(conditions: Conditions, chance: Chance): Promise<Picture> {
  const { width, height } = conditions.shot
  const [w, h] = [width >> 2, height >> 2]
  const small = makeGround(conditions.ground, w, h, chance)
  const rgb = await sharp(small, { raw: { width: w, height: h, channels: 3 } })
    .resize(width, height, { kernel: 'linear' })
    .raw()
    .toBuffer()
  return { width, height, rgb: new Uint8Array(rgb.buffer, rgb.byteOffset, rgb.byteLength) }
}

/** A picture with no sheet in it. */
export async function photographGround(ground: Ground, chance: Chance): Promise<Buffer> {
  const drawn = drawConditions('ordinary', chance)
  const conditions = { ...drawn, ground, shot: { ...drawn.shot, width: 1800, height: 2400 } }
  const picture = await layGround(conditions, chance.fork('ground'))
  shine(picture, mapLight(conditions.light, picture.width, picture.height, chance.fork('light')), conditions.light.white)
  return develop(picture, conditions.optics, chance.fork('grain'))
}

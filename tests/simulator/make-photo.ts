/** One whole photo: a trial, a printed sheet, a hand, a camera; and exactly what was written and where it lies. */

import { printSheets } from '../../server/print/sheet-pdf.ts'
import { boxesOf } from '../../shared/layouts/geometry.ts'
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import { makeSheetCode } from '../../shared/layouts/sheet-code.ts'
import { makeGround } from './background.ts'
import { aim, type Camera } from './camera.ts'
import { develop, shine } from './develop.ts'
import { type DigitPool, loadDigits } from './digits.ts'
import { type InkLayer, newInk } from './ink.ts'
import { type Conditions, drawConditions, type Level } from './levels.ts'
import { mapLight } from './light.ts'
import { drawFlap, holdWithThumb, lostPart } from './obstacles.ts'
import { renderPage } from './page-render.ts'
import { castShadow } from './page-shadow.ts'
import { joinPaper, type Paper } from './paper.ts'
import { planOf } from './plan.ts'
import type { Chance } from './random.ts'
import { drawPage, type Picture } from './raster.ts'
import { FLAT, scan } from './scan.ts'
import type { Scenario, Truth } from './scenario.ts'
import { tillageScenario } from './scenario-tillage.ts'
import { chooseSpoiled, makeWrongSum } from './spoil.ts'
import { soil } from './stains.ts'
import { bendSheet, drawBend, type Surface } from './surface.ts'
import { writeSheet } from './write-sheet.ts'
import { makeWriter, type Writer } from './writer.ts'

export interface PhotoRequest {
  layout: Layout
  level: Level
  chance: Chance
  digits: DigitPool
  planned: boolean
  /** Fixed values instead of drawn ones. */
  scenario?: Scenario
  sheetCode?: string
  conditions?: Partial<Conditions>
  writer?: Partial<Writer>
}

/** Corners of each cell in pixels of the photo, clockwise from its top left; multi-box cells as one outline. */
export type PhotoMap = { cells: Record<string, Array<[number, number]>> }

export interface Photo {
  jpeg: Buffer
  truth: Truth
  map: PhotoMap
}

let spareInk: InkLayer | null = null
function freshInk(layout: Layout): InkLayer {
  spareInk ??= newInk(layout.page.width, layout.page.height)
  spareInk.cover.fill(0)
  return spareInk
}

/** Makes the photo of one filled sheet. */
export async function makePhoto(request: PhotoRequest): Promise<Photo> {
  const { layout, level, chance } = request
  const conditions = { ...drawConditions(level, chance.fork('conditions')), ...request.conditions }
  const writer = { ...makeWriter(chance.fork('writer'), conditions.careful), ...request.writer }
  const scenario = request.scenario ?? drawScenario(layout, conditions, chance)
  const sheetCode = request.sheetCode ?? makeSheetCode((below) => chance.whole(0, below - 1))
  const { plan, planned } = request.planned ? planOf(layout, scenario) : { plan: null, planned: undefined }

  const ink = freshInk(layout)
  writeSheet({ ink, digits: loadDigits(request.digits), writer, chance: chance.fork('hand') }, layout, scenario)
  const print = await renderPage(await printSheets([{ layout, sheetCode, plan }]), ink)

  const joined = (coarse: boolean) => {
    const paper = joinPaper(print, ink, writer, paperWhite(chance.fork('paper')), chance.fork('toner').between(0.8, 1), coarse)
    if (conditions.dirt) paper.stain = soil(conditions.dirt, layout.page, chance.fork('dirt'))
    if (conditions.lost) paper.lost = lostPart(conditions.lost, layout.page, paper.dotsPerMm)
    return paper
  }
  const taken = conditions.scan
    ? { ...(await scan(conditions.scan, joined(conditions.scan.dpi < 250), layout.page, chance.fork('grain'))), surface: FLAT }
    : await photograph(conditions, joined, layout, chance)
  const { jpeg, camera, surface } = taken
  const truth: Truth = {
    layout: layout.key,
    version: layout.version,
    sheet: sheetCode,
    level,
    ...scenario,
    ...(planned ? { planned } : {}),
  }
  return { jpeg, truth, map: mapCells(layout, surface, camera, scenario) }
}

/** Copier paper is a little blue or a little yellow, never quite white. */
function paperWhite(chance: Chance): readonly [number, number, number] {
  const white = chance.between(232, 252)
  return [white + chance.between(-3, 3), white + chance.between(-3, 2), white - chance.between(0, 9)]
}

async function photograph(conditions: Conditions, joined: (coarse: boolean) => Paper, layout: Layout, chance: Chance) {
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

function drawScenario(layout: Layout, conditions: Conditions, chance: Chance): Scenario {
  const scenario = tillageScenario(chance.fork('scenario'))
  const slips = chance.fork('slips')
  if (slips.odds(conditions.wrongSum)) makeWrongSum(scenario, slips)
  const count = Math.floor(conditions.spoiled + slips.unit())
  chooseSpoiled(scenario, layout, count, slips)
  return scenario
}

function pixelsPerMm(camera: Camera, surface: Surface, layout: Layout): number {
  const [x, y] = [layout.page.width / 2, layout.page.height / 2]
  const [a, b] = [camera.project(surface.at(x - 5, y - 5)), camera.project(surface.at(x + 5, y + 5))]
  return Math.hypot(a[0] - b[0], a[1] - b[1]) / Math.hypot(10, 10)
}

async function layGround(conditions: Conditions, chance: Chance): Promise<Picture> {
  const { width, height } = conditions.shot
  const { default: sharp } = await import('sharp')
  const [w, h] = [width >> 2, height >> 2]
  const small = makeGround(conditions.ground, w, h, chance)
  const rgb = await sharp(small, { raw: { width: w, height: h, channels: 3 } })
    .resize(width, height, { kernel: 'linear' })
    .raw()
    .toBuffer()
  return { width, height, rgb: new Uint8Array(rgb.buffer, rgb.byteOffset, rgb.byteLength) }
}

function mapCells(layout: Layout, surface: Surface, camera: Camera, scenario: Scenario): PhotoMap {
  const cells: PhotoMap['cells'] = {}
  const place = (x: number, y: number): [number, number] => {
    const [px, py] = camera.project(surface.at(x, y))
    return [Math.round(px * 100) / 100, Math.round(py * 100) / 100]
  }
  for (const cell of layout.cells) {
    if (scenario.readings[cell.key] === undefined) continue
    const boxes = boxesOf(cell)
    const outline = (list: typeof boxes): Array<[number, number]> => {
      const left = Math.min(...list.map((b) => b.x))
      const top = Math.min(...list.map((b) => b.y))
      const right = Math.max(...list.map((b) => b.x + b.width))
      const low = Math.max(...list.map((b) => b.y + b.height))
      return [place(left, top), place(right, top), place(right, low), place(left, low)]
    }
    cells[cell.key] = outline(boxes)
    if (isComb(cell))
      boxes.forEach((box, i) => {
        cells[`${cell.key}#${i + 1}`] = outline([box])
      })
    else if (cell.kind === 'choice')
      boxes.forEach((box) => {
        cells[`${cell.key}#${box.option}`] = outline([box])
      })
  }
  return { cells }
}

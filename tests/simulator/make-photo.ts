/** One whole photo: a trial, a printed sheet, a hand, a camera; and exactly what was written and where it lies. */

import { type PlanLine, printSheets } from '../../server/print/sheet-pdf.ts'
import { boxesOf } from '../../shared/layouts/geometry.ts'
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import { makeSheetCode } from '../../shared/layouts/sheet-code.ts'
import type { Camera } from './camera.ts'
import { type DigitPool, loadDigits } from './digits.ts'
import { type InkLayer, newInk } from './ink.ts'
import { type Conditions, drawConditions, type Level } from './levels.ts'
import { lostPart } from './obstacles.ts'
import { renderPage } from './page-render.ts'
import { joinPaper } from './paper.ts'
import { photograph } from './photograph.ts'
import { planOf } from './plan.ts'
import type { Chance } from './random.ts'
import { FLAT, scan } from './scan.ts'
import type { Scenario, Truth } from './scenario.ts'
import { scenarioFor } from './scenario-any.ts'
import { chooseSpoiled, makeWrongSum } from './spoil.ts'
import { soil } from './stains.ts'
import type { Surface } from './surface.ts'
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
  /** Changes the drawn conditions. */
  adjust?: (drawn: Conditions) => Conditions
  /** The typed block as the plan prints it; made up from the planned cells otherwise. */
  planLines?: readonly PlanLine[]
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
  const drawn = { ...drawConditions(level, chance.fork('conditions')), ...request.conditions }
  const conditions = request.adjust ? request.adjust(drawn) : drawn
  const writer = { ...makeWriter(chance.fork('writer'), conditions.careful), ...request.writer }
  const scenario = request.scenario ?? drawScenario(layout, conditions, chance)
  const sheetCode = request.sheetCode ?? makeSheetCode((below) => chance.whole(0, below - 1))
  const { plan, planned } = request.planned ? planOf(layout, scenario) : { plan: null, planned: undefined }

  const ink = freshInk(layout)
  writeSheet({ ink, digits: loadDigits(request.digits), writer, chance: chance.fork('hand') }, layout, scenario)
  const print = await renderPage(await printSheets([{ layout, sheetCode, plan: plan && (request.planLines ?? plan) }]), ink)

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

function drawScenario(layout: Layout, conditions: Conditions, chance: Chance): Scenario {
  const scenario = scenarioFor(layout, chance.fork('scenario'))
  const slips = chance.fork('slips')
  if (slips.odds(conditions.wrongSum)) makeWrongSum(scenario, layout, slips)
  const count = Math.floor(conditions.spoiled + slips.unit())
  chooseSpoiled(scenario, layout, count, slips)
  return scenario
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

/** A sheet filled in on a computer, printed, signed with a pen, then scanned or photographed; and what was typed. */
import { printSheets } from '../../../server/print/sheet-pdf.ts'
import { boxesOf } from '../../../shared/layouts/geometry.ts'
import type { Layout } from '../../../shared/layouts/layout.ts'
import { makeSheetCode } from '../../../shared/layouts/sheet-code.ts'
import { newInk } from '../ink.ts'
import { drawConditions, type Level } from '../levels.ts'
import { renderPage } from '../page-render.ts'
import { joinPaper } from '../paper.ts'
import { photograph } from '../photograph.ts'
import type { Chance } from '../random.ts'
import { scan } from '../scan.ts'
import type { Scenario, Truth } from '../scenario.ts'
import { scenarioFor } from '../scenario-any.ts'
import { sign } from '../strokes.ts'
import { makeWriter } from '../writer.ts'
import { FACES, type FaceName, type Typing, typePage } from './type-sheet.ts'

export interface TypedRequest {
  layout: Layout
  chance: Chance
  /** How it came in: scanned flat, or photographed as well as the level says. */
  by: 'scan' | Level
  typing?: Partial<Typing>
  /** Changes what is typed. */
  change?: (scenario: Scenario) => void
}

export interface TypedSheet {
  jpeg: Buffer
  truth: Truth
  typing: Typing
}

const drawTyping = (chance: Chance): Typing => ({
  face: chance.pick(Object.keys(FACES) as FaceName[]),
  size_pt: chance.between(11, 15),
  way: chance.odds(0.7) ? 'boxed' : 'run',
  off: [chance.normal(0, 0.25), chance.normal(0, 0.3)],
})

export async function makeTyped(request: TypedRequest): Promise<TypedSheet> {
  const { layout, chance, by } = request
  const level: Level = by === 'scan' ? 'easy' : by
  const conditions = { ...drawConditions(level, chance.fork('conditions')), dirt: null, lost: null, thumb: false }
  const typing = { ...drawTyping(chance.fork('typing')), ...request.typing }
  const scenario = scenarioFor(layout, chance.fork('scenario'))
  request.change?.(scenario)
  const sheetCode = makeSheetCode((below) => chance.whole(0, below - 1))
  const ink = newInk(layout.page.width, layout.page.height)
  const print = await renderPage(await printSheets([{ layout, sheetCode, plan: null }]), ink)
  const type = await renderPage(await typePage(layout, scenario, typing), ink)
  const both = { ...print, grey: print.grey.map((value, i) => Math.min(value, type.grey[i]!)) }
  const writer = makeWriter(chance.fork('writer'), 1)
  for (const cell of layout.cells) {
    if (cell.kind === 'signature' && scenario.readings[cell.key] === true) sign(ink, boxesOf(cell)[0]!, writer.pen, chance)
  }
  const joined = (coarse: boolean) => joinPaper(both, ink, writer, [244, 244, 240], chance.fork('toner').between(0.8, 1), coarse)
  const plan = { ...scanPlan(chance.fork('scan')) }
  const { jpeg } =
    by === 'scan'
      ? await scan(plan, joined(plan.dpi < 250), layout.page, chance.fork('grain'))
      : await photograph({ ...conditions, scan: null }, joined, layout, chance)
  return { jpeg, typing, truth: { layout: layout.key, version: layout.version, sheet: sheetCode, level, ...scenario } }
}

const scanPlan = (chance: Chance) => ({
  dpi: chance.pick([200, 300]),
  grey: chance.odds(0.6),
  skew: chance.normal(0, 0.008),
  scale: 1,
  copied: chance.odds(0.2),
  contrast: 1.2,
  jpegQuality: chance.whole(70, 92),
})

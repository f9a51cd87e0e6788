/** One photo or scan of a filled sheet under a condition, with what was written and where each cell lies. */
import { printSheets } from '../../../server/print/sheet-pdf.ts'
import type { Layout } from '../../../shared/layouts/layout.ts'
import { makeSheetCode } from '../../../shared/layouts/sheet-code.ts'
import { loadDigits } from '../digits.ts'
import { newInk } from '../ink.ts'
import type { Photo } from '../make-photo.ts'
import { renderPage } from '../page-render.ts'
import { joinPaper } from '../paper.ts'
import { planOf } from '../plan.ts'
import type { Chance } from '../random.ts'
import { scenarioFor } from '../scenario-any.ts'
import { chooseSpoiled, makeWrongSum } from '../spoil.ts'
import { writeSheet } from '../write-sheet.ts'
import type { Condition } from './condition.ts'
import { handOf } from './hand.ts'
import { outlinesOf } from './outlines.ts'
import { paperPage, reprint, streak } from './reprint.ts'
import { takePicture } from './take-picture.ts'

/** As in the standard set, so that shares can be compared: spoiled cells a sheet, wrong sums, planned sheets. */
const SPOILED = 1.3
const WRONG_SUM = 0.16
const PLANNED = 0.3
const CAREFUL = [0.45, 0.95] as const
const COPIER_WHITE = [246, 246, 242] as const

export async function makeShape(condition: Condition, layout: Layout, chance: Chance): Promise<Photo> {
  const scenario = scenarioFor(layout, chance.fork('scenario'))
  const slips = chance.fork('slips')
  if (slips.odds(WRONG_SUM)) makeWrongSum(scenario, layout, slips)
  chooseSpoiled(scenario, layout, Math.floor(SPOILED + slips.unit()), slips)
  const sheetCode = makeSheetCode((below) => chance.whole(0, below - 1))
  const isPlanned = chance.fork('planned').odds(PLANNED)
  const { plan, planned } = isPlanned ? planOf(layout, scenario) : { plan: null, planned: undefined }

  const writer = handOf(condition.writer, chance.between(...CAREFUL), chance.fork('writer'))
  const ink = newInk(layout.page.width, layout.page.height)
  writeSheet({ ink, digits: loadDigits('held back'), writer, chance: chance.fork('hand') }, layout, scenario)
  const print = await renderPage(await printSheets([{ layout, sheetCode, plan }]), ink)

  const from = chance.fork('paper')
  const white = from.pick(condition.paper?.whites ?? [COPIER_WHITE])
  const toner = from.between(...(condition.paper?.toner ?? ([0.85, 1] as const)))
  const joined = (coarse: boolean) => {
    const paper = joinPaper(print, ink, writer, white, toner, coarse)
    if (condition.paper?.streaks) streak(paper, from.between(...condition.paper.streaks), chance.fork('streaks'))
    return reprint(paper, layout.page, condition.print)
  }
  const { jpeg, place } = await takePicture(condition, joined, paperPage(layout.page, condition.print), chance)
  const truth = {
    layout: layout.key,
    version: layout.version,
    sheet: sheetCode,
    level: condition.name,
    ...scenario,
    ...(planned ? { planned } : {}),
  }
  const written = new Set(Object.keys(scenario.readings).filter((key) => scenario.readings[key] !== undefined))
  return { jpeg, truth, map: outlinesOf(layout, written, place) }
}

/** A picture the reader could not place: a person sets its corners and it is read again, or keys the readings beside it. */
import { UserError } from '../../../shared/errors.ts'
import { isComb } from '../../../shared/layouts/layout.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import { parseSheetCode } from '../../../shared/layouts/sheet-code.ts'
import type { PlaceSheet, Sheet } from '../../../shared/schemas/sheet.ts'
import type { User } from '../../../shared/schemas/user.ts'
import type { Db } from '../../db/database.ts'
import type { SheetEntity } from '../../db/entities/sheet.ts'
import { planOfRun, planValues } from '../../db/intake/plan-of-run.ts'
import { sendJob } from '../../db/queue.ts'
import { placePage } from '../../db/repositories/page-placing.ts'
import { putReadings } from '../../db/repositories/reading.ts'
import { lockSheetsByCode, noteOnSheet } from '../../db/repositories/sheet.ts'
import type { Deps } from '../../http/route.ts'
import { getSheet, writeOnSheet } from './change-sheet.ts'

export async function placeSheet(deps: Deps, actor: User, id: string, input: PlaceSheet): Promise<Sheet> {
  const layout = findLayout(input.layout, input.layoutVersion)
  if (!layout) throw new UserError('invalid', `There is no layout ${input.layout} version ${input.layoutVersion}.`)
  const code = input.sheetCode ? parseSheetCode(input.sheetCode) : null
  if (input.sheetCode && !code)
    throw new UserError('invalid', `${input.sheetCode} is no sheet code: its check character does not fit.`)
  await writeOnSheet(
    { deps, actor, id, version: input.version, from: ['unreadable', 'waiting', 'settled'] },
    async (db, sheet) => {
      const runId = code ? await takeOverRun(db, sheet, code) : sheet.runId
      const base = {
        code: code ?? sheet.code,
        runId,
        layoutKey: layout.key,
        layoutVersion: layout.version,
        planned: runId !== null,
        reason: null,
      }
      if (input.corners) {
        const pageId = await placePage(db, id, {
          layout: layout.key,
          layoutVersion: layout.version,
          sheetCode: code,
          corners: input.corners,
        })
        if (!pageId) throw new UserError('conflict', 'This sheet has no picture to place.')
        await sendJob(deps.boss, db, 'page-read', { pageId })
        return {
          sheet: { ...base, state: 'being read' },
          trail: { action: 'placed', text: 'four corners set by hand; it is read again' },
        }
      }
      await keyBeside(
        db,
        id,
        layout.cells.filter((c) => !(runId && isComb(c) && c.planned)).map((c) => c.key),
        runId,
      )
      return {
        sheet: { ...base, state: 'waiting', origin: 'keyed' },
        trail: { action: 'placed', text: 'to be keyed beside the picture' },
      }
    },
  )
  return getSheet(deps, actor, id)
}

/** The printed sheet with this code has its picture now: its run goes over to the sheet that holds the picture. */
async function takeOverRun(db: Db, sheet: SheetEntity, code: string): Promise<string | null> {
  const printed = (await lockSheetsByCode(db, code)).find((s) => s.state === 'printed' && s.id !== sheet.id)
  if (!printed) return sheet.runId
  await noteOnSheet(db, printed.id, { state: 'set aside', reason: 'its picture was placed by hand', runId: null })
  return printed.runId
}

async function keyBeside(db: Db, sheetId: string, keys: readonly string[], runId: string | null): Promise<void> {
  const blank = {
    sheetId,
    value: null,
    readValue: null,
    unit: null,
    state: 'clear',
    origin: 'person',
    candidates: [],
    reasons: [],
    pageId: null,
    cellRef: null,
  } as const
  await putReadings(
    db,
    keys.map((key) => ({ ...blank, key, candidates: [], reasons: [] })),
  )
  const plan = runId ? await planOfRun(db, runId) : null
  if (plan) {
    const values = Object.entries(planValues(plan))
    await putReadings(
      db,
      values.map(([key, value]) => ({ ...blank, key, value, readValue: value, origin: 'plan', candidates: [], reasons: [] })),
    )
  }
}

/** Writing what was read into a sheet, as its first ink or as an answer to what was sent back; another picture of it: join-sheet.ts. */
import type { Db } from '../database.ts'
import type { ReadingEntity } from '../entities/reading.ts'
import type { SheetEntity } from '../entities/sheet.ts'
import { type PageEntity, PageEntity as Pages, type UploadEntity } from '../entities/upload.ts'
import { listReadings, putReadings, type ReadingRow } from '../repositories/reading.ts'
import { noteOnSheet } from '../repositories/sheet.ts'
import { addTrailLine } from '../repositories/trail.ts'
import type { PageOutcome } from './page-outcome.ts'
import { planOfRun, planValues } from './plan-of-run.ts'
import { type OpenDoubts, recheckSheet } from './recheck-sheet.ts'

type ReadPage = Extract<PageOutcome, { kind: 'read' }>
type Target = Pick<SheetEntity, 'id' | 'state' | 'runId'>

export async function fillSheet(db: Db, sheet: Target, page: PageEntity, upload: UploadEntity, read: ReadPage): Promise<string> {
  const plan = sheet.runId ? await planOfRun(db, sheet.runId) : null
  const before = await listReadings(db, sheet.id)
  const planned = read.planned && plan ? planRows(sheet.id, planValues(plan)) : []
  // What the plan knows is printed, not read: the plan's word stands where both have the cell.
  const known = new Set(planned.map((row) => row.key))
  const rows = [...readRows(sheet.id, page.id, read).filter((row) => !known.has(row.key)), ...planned]
  await putReadings(
    db,
    rows.filter((row) => !settledAlike(before, row)),
  )
  const answer = sheet.state === 'sent back'
  await noteOnSheet(db, sheet.id, {
    state: 'waiting',
    layoutKey: read.layout,
    layoutVersion: read.layoutVersion,
    planned: read.planned,
    origin: read.origin,
    arrivedAt: upload.receivedAt,
    reason: null,
    ...(answer ? { answered: true } : {}),
    ...(read.sheetCode ? { code: read.sheetCode } : {}),
  })
  // Before the line in the trail, which tells how many doubts there are.
  await db.update(Pages, { id: page.id }, { sheetId: sheet.id })
  const open = await recheckSheet(db, sheet.id)
  const text = `read from ${upload.fileName}, page ${page.number}: ${countsSaid(read, open)}`
  const details = before.length > 0 ? { before: before.map(({ key, value, origin }) => ({ key, value, origin })) } : {}
  await addTrailLine(db, {
    actor: null,
    action: answer ? 'answered' : 'read',
    subject: 'sheet',
    subjectId: sheet.id,
    text,
    details,
  })
  return sheet.id
}

/** With the rules' own doubts, so that the line agrees with the count the desk shows. */
function countsSaid(read: ReadPage, open: OpenDoubts): string {
  const inDoubt = read.readings.filter((r) => open.readings.has(r.key)).length
  const rules = open.byRules === 0 ? '' : `; the rules add ${counted(open.byRules, 'doubt')}`
  return `${counted(read.readings.length - inDoubt, 'reading')} clear${inDoubt > 0 ? `, ${inDoubt} in doubt` : ''}${rules}`
}

const counted = (n: number, noun: string) => `${n} ${noun}${n === 1 ? '' : 's'}`

const readRows = (sheetId: string, pageId: string, read: ReadPage): ReadingRow[] =>
  read.readings.map((r) => ({
    ...r,
    sheetId,
    pageId,
    readValue: r.value,
    origin: read.origin === 'photo' ? 'ink' : 'spreadsheet',
  }))

const planRows = (sheetId: string, values: Record<string, string | number>): ReadingRow[] =>
  Object.entries(values).map(([key, value]) => ({
    sheetId,
    key,
    value,
    readValue: value,
    unit: null,
    state: 'clear',
    origin: 'plan',
    candidates: [],
    reasons: [],
    pageId: null,
    cellRef: null,
  }))

/** A person's word on the same reading stays: a new picture that reads the same does not ask again. */
const settledAlike = (before: readonly ReadingEntity[], row: ReadingRow) =>
  before.some((b) => b.key === row.key && b.settlement !== null && (b.value === row.value || b.readValue === row.value))

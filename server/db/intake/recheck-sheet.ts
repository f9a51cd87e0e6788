/** After any change of a reading: facts, doubts, counts and state follow from the readings, and are never set by hand. */
import { judgeSheet } from '../../../shared/checks/judge-sheet.ts'
import type { Finding } from '../../../shared/checks/rule.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { SheetState } from '../../../shared/schemas/sheet.ts'
import type { Db } from '../database.ts'
import type { ReadingEntity } from '../entities/reading.ts'
import type { SheetEntity } from '../entities/sheet.ts'
import { PageEntity } from '../entities/upload.ts'
import { isOpenDoubt, listDoubts, putFindings } from '../repositories/doubt.ts'
import { isOpen, listReadings, valuesOf } from '../repositories/reading.ts'
import { findSheet, noteOnSheet } from '../repositories/sheet.ts'
import { planFindings } from './plan-findings.ts'
import { planOfRun } from './plan-of-run.ts'
import { factsOf, namedOnSheet, registerFindings } from './sheet-facts.ts'
import { ownerOf } from './sheet-owner.ts'

/** Not "being read": until the page is taken in, what stands there is not what the picture says. */
const FOLLOWS_DOUBTS: readonly SheetState[] = ['arrived', 'waiting', 'settled']

export interface OpenDoubts {
  /** Keys of readings in doubt. */
  readings: ReadonlySet<string>
  /** Doubts that rules raised. */
  byRules: number
}

const NONE: OpenDoubts = { readings: new Set(), byRules: 0 }

export async function recheckSheet(db: Db, sheetId: string): Promise<OpenDoubts> {
  const sheet = await findSheet(db, sheetId)
  const layout = sheet?.layoutKey ? findLayout(sheet.layoutKey, sheet.layoutVersion ?? undefined) : null
  if (!sheet || !layout) return NONE
  const readings = await listReadings(db, sheetId)
  // Not read yet, or not to be read: there is nothing to judge.
  if (readings.length === 0) return NONE
  const values = valuesOf(readings)
  const named = await namedOnSheet(db, values)
  const facts = await factsOf(db, sheet, values, named)
  const findings = [
    ...registerFindings(values, named),
    ...(await againstPlan(db, sheet)),
    ...judgeSheet(layout, values, facts).findings,
  ]
  await putFindings(
    db,
    sheetId,
    findings.filter((f) => !answeredByPerson(f, readings)),
  )
  const doubts = (await listDoubts(db, sheetId)).filter(isOpenDoubt)
  const inDoubt = readings.filter(isOpen)
  const openDoubts = doubts.length + inDoubt.length
  await noteOnSheet(db, sheetId, {
    facts: { ...facts },
    ownerId: await ownerOf(db, sheet, readings),
    openDoubts,
    stops: doubts.filter((d) => d.severity === 'stop').length,
    // What keeps it from being read comes before what was once read.
    firstDoubt: sheet.state === 'unreadable' ? sheet.reason : (doubts[0]?.text ?? firstReason(inDoubt, layout.cells)),
    ...(FOLLOWS_DOUBTS.includes(sheet.state) ? { state: openDoubts > 0 ? 'waiting' : 'settled' } : {}),
  })
  return { readings: new Set(inDoubt.map((r) => r.key)), byRules: doubts.length }
}

/** A sheet whose typed block was recognised is held against its plan as it stands now. */
async function againstPlan(db: Db, sheet: SheetEntity): Promise<Finding[]> {
  const plan = sheet.planned && sheet.runId ? await planOfRun(db, sheet.runId) : null
  const page = plan && (await db.findOne(PageEntity, { where: { sheetId: sheet.id, state: 'read' }, order: { readAt: 'DESC' } }))
  const lines = page?.reading?.planText
  return plan && Array.isArray(lines) ? planFindings(lines as string[], plan) : []
}

/** "Blank" is no longer a question where a person said: blank on purpose, or unreadable. */
function answeredByPerson(finding: Finding, readings: readonly ReadingEntity[]): boolean {
  if (finding.rule !== 'Q56' && finding.rule !== 'Q57') return false
  return finding.cells.every((key) => {
    const how = readings.find((r) => r.key === key)?.settlement
    return how === 'blank on purpose' || how === 'unreadable'
  })
}

function firstReason(inDoubt: readonly ReadingEntity[], cells: ReadonlyArray<{ key: string; label: string }>): string | null {
  const first = inDoubt[0]
  if (!first) return null
  const label = cells.find((c) => c.key === first.key)?.label ?? first.key
  const [one, two] = first.candidates
  return first.reasons[0]?.text ?? (two ? `${label}: ${String(one?.value)} or ${String(two.value)}` : `${label}: cannot be read`)
}

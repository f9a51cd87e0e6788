import { UserError } from '../../../shared/errors.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { User } from '../../../shared/schemas/user.ts'
import { listPlannedSheets, type PlannedSheet } from '../../db/repositories/printed-plan.ts'
import type { Deps } from '../../http/route.ts'
import { planLines } from '../../print/plan-lines.ts'
import { maySee } from './get-demonstration.ts'

/**
 * The sheets of a demonstration, or one of them, as PDF; printing again gives the same sheets with the same codes.
 * @throws UserError `not_found`, also for another demonstrator's
 */
export async function printPlanned(
  deps: Deps,
  actor: User,
  which: { demonstrationId: string } | { sheetId: string },
): Promise<Buffer> {
  const sheets = await listPlannedSheets(deps.source.manager, which)
  const [first] = sheets
  if (!first || !maySee(actor, first.demonstratorId)) throw new UserError('not_found', 'There is no planned sheet here to print.')
  // Loaded when first printed: a PDF writer takes its time to start.
  const { printSheets } = await import('../../print/sheet-pdf.ts')
  return printSheets(sheets.map(toPrint))
}

function toPrint({ code, layoutKey, layoutVersion, plan }: PlannedSheet) {
  const layout = findLayout(layoutKey, layoutVersion)
  if (!layout) throw new Error(`sheet ${code} is on layout ${layoutKey} ${layoutVersion}, which there is none of`)
  return { layout, sheetCode: code, plan: planLines(plan) }
}

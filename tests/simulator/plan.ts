/** Turns what a plan knows into the typed block, and takes those cells off the handwritten part. */
import type { PlanLine } from '../../server/print/sheet-pdf.ts'
import { isComb, type Layout } from '../../shared/layouts/layout.ts'
import type { Scenario, Written } from './scenario.ts'

/** Removes the planned cells from the scenario: a planned sheet has no boxes for them. */
export function planOf(layout: Layout, scenario: Scenario): { plan: PlanLine[]; planned: Record<string, Written> } {
  const plan: PlanLine[] = []
  const planned: Record<string, Written> = {}
  for (const cell of layout.cells) {
    if (!isComb(cell) || !cell.planned) continue
    const value = scenario.readings[cell.key]
    if (value === undefined || value === null) continue
    planned[cell.key] = value
    delete scenario.readings[cell.key]
    scenario.spoiled = scenario.spoiled.filter((key) => key !== cell.key)
    const text = cell.kind === 'date' ? String(value).split('-').reverse().join('-') : String(value).padStart(4, '0')
    plan.push({ label: cell.label.replace(' no.', ''), value: text })
  }
  return { plan, planned }
}

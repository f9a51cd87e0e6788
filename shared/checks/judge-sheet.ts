/** The one way from a sheet's values to its findings and results: worker, server and desk call this, so they cannot differ. */
import { isComb, type Layout, wordsFor } from '../layouts/layout.ts'
import type { Facts } from '../trial/facts.ts'
import type { Readings } from '../trial/readings.ts'
import type { CellInfo } from './cells.ts'
import type { CheckOptions } from './context.ts'
import { resultsUnderChecks } from './results-under-checks.ts'
import type { Finding } from './rule.ts'

const optionsByLayout = new WeakMap<Layout, CheckOptions>()

/** Words, units, places, needs and limits as the layout states them: its cells are their one definition. */
export function checkOptions(layout: Layout): CheckOptions {
  const kept = optionsByLayout.get(layout)
  if (kept) return kept
  const cells: Record<string, CellInfo> = {}
  for (const cell of layout.cells) {
    cells[cell.key] = {
      label: wordsFor(cell),
      mandatory: cell.need === 'mandatory',
      ...(isComb(cell) && cell.kind === 'digits' ? { decimals: cell.scale ? undefined : decimalsOf(cell.format) } : {}),
      ...(isComb(cell) && cell.unit ? { unit: cell.unit } : {}),
      ...(isComb(cell) && cell.hard ? { hard: cell.hard } : {}),
      ...(isComb(cell) && cell.plausible ? { plausible: cell.plausible } : {}),
    }
  }
  const options = { cells }
  optionsByLayout.set(layout, options)
  return options
}

const decimalsOf = (format: string) => (format.includes('.') ? format.length - format.indexOf('.') - 1 : 0)

export const judgeSheet = (layout: Layout, readings: Readings, facts: Facts) =>
  resultsUnderChecks(readings, facts, checkOptions(layout))

/** Rule, cells and the numbers compared: what a person settled on these numbers stands only for these numbers. */
export const fingerprintOf = (finding: Pick<Finding, 'rule' | 'cells' | 'compared'>) =>
  JSON.stringify([finding.rule, finding.cells, Object.entries(finding.compared).sort(([a], [b]) => (a < b ? -1 : 1))])

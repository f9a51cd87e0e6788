/** From a sheet's reading to the document that is printed, stored and compared. */
import { judgeSheet } from '../../../shared/checks/judge-sheet.ts'
import type { SheetReading } from '../../../shared/reading/sheet-reading.ts'
import type { PageCell, PageReading } from '../../../shared/schemas/page-reading.ts'
import type { Facts } from '../../../shared/trial/facts.ts'

export interface PageName {
  file: string
  page: number
}

/** `facts`: what registers know; without them the results that need one are null with the reason. */
export function assemblePage(name: PageName, reading: SheetReading, facts: Facts = {}): PageReading {
  const { layout, takeAgain, sheetCode, planned, map, quality } = reading
  const started = performance.now()
  const readings: Record<string, PageCell> = {}
  for (const [key, { fit_mm: _, ...cell }] of reading.readings) readings[key] = cell
  let results: PageReading['results'] = null
  if (layout && !takeAgain) {
    const values = Object.fromEntries(Object.entries(readings).map(([key, cell]) => [key, cell.value]))
    const judged = judgeSheet(layout, values, facts)
    results = Object.fromEntries(Object.entries(judged.results).map(([key, { budget: _, ...result }]) => [key, result]))
    for (const { rule, severity, text, cells } of judged.findings) {
      if (severity === 'note') continue
      for (const key of cells) readings[key]?.reasons.push({ rule, text, cells })
    }
  }
  const ms = { ...reading.ms, checks: performance.now() - started }
  const total = Object.values(ms).reduce((sum, v) => sum + v, 0)
  return {
    ...name,
    sheet: sheetCode,
    layout: layout?.key ?? null,
    version: layout?.version ?? null,
    takeAgain,
    readings,
    results,
    ms: Object.fromEntries(Object.entries({ ...ms, total }).map(([stage, v]) => [stage, Math.round(v * 10) / 10])),
    planned,
    planText: [],
    transform: map,
    quality,
  }
}

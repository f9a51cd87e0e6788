/** From a run of a spreadsheet form to what the intake takes. */
import type { PageOutcome, ReadReading } from '../../server/db/intake/page-outcome.ts'
import { type Block, blockSchema } from '../readers/spreadsheet/block.ts'

/** Remarks are the one place of a form for words, so what is wrong with the run as a whole is doubted there. */
const PLACE_FOR_PROBLEMS = 'remarks'
const FORM_RULE = 'form'

export function readBlock(stored: Record<string, unknown>): PageOutcome {
  const block = blockSchema.parse(stored)
  return {
    kind: 'read',
    layout: block.layout,
    layoutVersion: block.version,
    planned: block.planned,
    sheetCode: block.sheetCode,
    origin: 'spreadsheet',
    readings: withProblems(
      block,
      Object.entries(block.values).map(([key, { raw: _, ...value }]) => ({ key, ...value })),
    ),
  }
}

function withProblems(block: Block, readings: ReadReading[]): ReadReading[] {
  if (block.problems.length === 0) return readings
  const reasons = block.problems.map((text) => ({ rule: FORM_RULE, text, cells: [PLACE_FOR_PROBLEMS] }))
  const blank = { key: PLACE_FOR_PROBLEMS, value: null, unit: null, candidates: [], reasons: [], cellRef: null }
  const place = readings.find((reading) => reading.key === PLACE_FOR_PROBLEMS) ?? blank
  const doubted: ReadReading = { ...place, state: 'in doubt', reasons: [...place.reasons, ...reasons] }
  return [...readings.filter((reading) => reading.key !== PLACE_FOR_PROBLEMS), doubted]
}

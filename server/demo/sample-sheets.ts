/** The photographed sheets of the season: files in samples/, and which run each belongs to. */
import { readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { z } from 'zod'
import type { DemoRun } from './season.ts'

const SAMPLES = 'samples'

const ids = z.object({
  demonstrator_id: z.number(),
  place_id: z.number(),
  tractor_id: z.number(),
  implement_id: z.number(),
  kit_id: z.number(),
})
const entrySchema = z.object({
  case: z.string(),
  file: z.string(),
  sheetCode: z.string().nullable(),
  planned: z.boolean(),
  ids: ids.nullable(),
  trial_date: z.string().nullable(),
})
export type SampleSheet = z.infer<typeof entrySchema>

export async function readSampleSheets(): Promise<SampleSheet[]> {
  return z.array(entrySchema).parse(JSON.parse(await readFile(join(SAMPLES, 'season.json'), 'utf8')))
}

/** The runs that the planned ones among them were printed for. */
export function sampleRuns(sheets: readonly SampleSheet[]): DemoRun[] {
  const taken = new Map<string, number>()
  return sheets.flatMap(({ planned, sheetCode, ids, trial_date }) => {
    if (!planned || !sheetCode || !ids || !trial_date) return []
    const trial = `${trial_date}|${ids.place_id}|${ids.tractor_id}|${ids.implement_id}`
    const run = (taken.get(trial) ?? 0) + 1
    taken.set(trial, run)
    return [
      {
        heldOn: trial_date,
        place: ids.place_id,
        demonstrator: ids.demonstrator_id,
        tractor: ids.tractor_id,
        implement: ids.implement_id,
        kit: ids.kit_id,
        plot: 'A, by the road',
        run,
        sheetCode,
      },
    ]
  })
}

export const sampleFile = (sheet: Pick<SampleSheet, 'case' | 'file'>) => join(SAMPLES, sheet.case, sheet.file)

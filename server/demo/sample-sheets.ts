/** The photographed sheets of the season: files in samples/, and which run each belongs to. */
import { readdir, readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { z } from 'zod'
import type { DemoRun } from './season.ts'

const SAMPLES = 'samples'

const idsSchema = z.object({
  demonstrator_id: z.number(),
  place_id: z.number(),
  tractor_id: z.number(),
  implement_id: z.number(),
  kit_id: z.number(),
})

const sheetSchema = z.object({
  case: z.string(),
  sheetCode: z.string(),
  /** false: a blank sheet was used, and its head is handwritten. */
  planned: z.boolean(),
  trial_date: z.string(),
  ids: idsSchema,
  plot: z.string(),
  run: z.number(),
})
export type SampleSheet = z.infer<typeof sheetSchema>

export async function readSampleSheets(): Promise<SampleSheet[]> {
  return z.array(sheetSchema).parse(JSON.parse(await readFile(join(SAMPLES, 'season.json'), 'utf8')))
}

/** The runs that the planned ones among them were printed for. */
export const sampleRuns = (sheets: readonly SampleSheet[]): DemoRun[] =>
  sheets
    .filter((s) => s.planned)
    .map(({ ids, trial_date, plot, run, sheetCode }) => ({
      heldOn: trial_date,
      place: ids.place_id,
      demonstrator: ids.demonstrator_id,
      tractor: ids.tractor_id,
      implement: ids.implement_id,
      kit: ids.kit_id,
      plot,
      run,
      sheetCode,
    }))

/** Every photo and scan of samples/, oldest case first by name; `truth` is what was written on it. */
export async function listSampleFiles(): Promise<string[]> {
  const folders = await readdir(SAMPLES, { withFileTypes: true })
  const files = await Promise.all(
    folders
      .filter((f) => f.isDirectory() && f.name !== 'season')
      .map(async (f) =>
        (await readdir(join(SAMPLES, f.name))).filter((n) => /\.(jpg|pdf)$/.test(n)).map((n) => join(SAMPLES, f.name, n)),
      ),
  )
  return files.flat().sort()
}

export const truthFile = (sheet: Pick<SampleSheet, 'case'>) => join(SAMPLES, sheet.case, `${sheet.case}.truth.json`)

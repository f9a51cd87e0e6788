/** What must come out of a sample: the reader's states and values, looked through against what was written. */
import { readdir, readFile, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { z } from 'zod'
import { pageCellSchema, pageReadingSchema } from '../../shared/schemas/page-reading.ts'
import type { Truth } from './scenario.ts'

/** Built from the reader's own schema, so that neither can drift from the other. */
export const expectedPageSchema = pageReadingSchema.pick({ page: true, sheet: true, layout: true, version: true }).extend({
  /** The code of "take it again", or null. */
  takeAgain: z.string().nullable(),
  readings: z.record(z.string(), pageCellSchema.pick({ state: true, value: true })),
})
export const expectedSchema = z.array(expectedPageSchema).min(1)
export type ExpectedPage = z.infer<typeof expectedPageSchema>

const ROOT = 'samples'

/** The picture or PDF of a case, and its truth, one entry a page. */
export async function openSample(name: string): Promise<{ file: string; bytes: Buffer; truths: Truth[] }> {
  const folder = join(ROOT, name)
  const file = (await readdir(folder)).find((f) => f.endsWith('.jpg') || f.endsWith('.pdf'))
  if (!file) throw new Error(`${folder} holds no picture`)
  const truth: Truth | Truth[] = JSON.parse(await readFile(join(folder, `${name}.truth.json`), 'utf8'))
  return { file, bytes: await readFile(join(folder, file)), truths: Array.isArray(truth) ? truth : [truth] }
}

/** Reduces what the reader said of a page to what the samples hold fast. */
export const toExpected = (page: z.infer<typeof pageReadingSchema>): ExpectedPage => ({
  page: page.page,
  sheet: page.sheet,
  layout: page.layout,
  version: page.version,
  takeAgain: page.takeAgain?.code ?? null,
  readings: Object.fromEntries(Object.entries(page.readings).map(([key, { state, value }]) => [key, { state, value }])),
})

/** Reads the cases, writes expected.json, and says where the reader and the writer differ: those are for a person to judge. */
export async function writeExpected(cases: readonly string[]): Promise<void> {
  const { createPhotoReader } = await import('../../worker/readers/photo/read-page.ts')
  const reader = await createPhotoReader()
  for (const name of cases) {
    const { file, bytes, truths } = await openSample(name)
    const pages = (await reader.read(bytes, file)).map(toExpected)
    await writeFile(join(ROOT, name, 'expected.json'), `${JSON.stringify(pages, null, 1)}\n`)
    pages.forEach((page, i) => {
      process.stdout.write(`${name} page ${page.page}: ${summary(page)}\n`)
      for (const line of differences(page, truths[i])) process.stdout.write(`  ${line}\n`)
    })
  }
  await reader.close()
}

function summary(page: ExpectedPage): string {
  const cells = Object.values(page.readings)
  const doubts = cells.filter((c) => c.state === 'in doubt').length
  return page.takeAgain ? `take again, ${page.takeAgain}` : `${cells.length} readings, ${doubts} in doubt`
}

/** Clear readings that say something else than the hand wrote. */
export function differences(page: ExpectedPage, truth: Truth | undefined): string[] {
  return Object.entries(page.readings).flatMap(([key, { state, value }]) => {
    const written = truth?.readings[key]
    if (state !== 'clear' || written === undefined || written === value) return []
    // A line is kept as a picture; whether it holds writing is not a value anybody wrote.
    return written === null && value === true ? [] : [`${key}: written ${String(written)}, read clear as ${String(value)}`]
  })
}

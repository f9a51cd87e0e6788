import { readdir, readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createPhotoReader, type PhotoReader } from '../../worker/readers/photo/read-page.ts'
import { differences, type ExpectedPage, expectedSchema, openSample, toExpected } from '../simulator/expected.ts'
import { SAMPLE_CASES } from '../simulator/sample-cases.ts'
import { SAMPLE_RUNS } from '../simulator/sample-season.ts'
import type { Truth } from '../simulator/scenario.ts'

/** Cells left blank or crossed out, which no value may be read from, and sums the writer got wrong. */
const onPurpose = (truth: { spoiled: string[]; wrongSum: string[] }) => [...truth.spoiled, ...truth.wrongSum]

const heads = ({ page, sheet, layout, version, takeAgain }: ExpectedPage) => ({ page, sheet, layout, version, takeAgain })

/**
 * Readings of a page that may fall into doubt with the right value: processors round the net's sums differently, which moves a
 * reading that stands on the threshold. More than this is a reader that got worse.
 */
const ON_THE_EDGE = 2

/** What came out worse than expected. A doubt that became clear with what was written is better, not worse. */
function worse(expected: ExpectedPage, page: ExpectedPage, truth: Truth | undefined): string[] {
  const edge: string[] = []
  const wrong = Object.entries(expected.readings).flatMap(([key, { state, value }]) => {
    const now = page.readings[key]
    const line = `${key}: expected ${state} ${String(value)}, came out ${now ? `${now.state} ${String(now.value)}` : 'not at all'}`
    if (!now) return [line]
    if (state === 'in doubt') return now.state === 'in doubt' || now.value === truth?.readings[key] ? [] : [line]
    if (now.value !== value) return [line]
    if (now.state === 'in doubt') edge.push(line)
    return []
  })
  return edge.length > ON_THE_EDGE ? [...wrong, ...edge] : wrong
}

describe('samples', () => {
  let reader: PhotoReader
  beforeAll(async () => {
    reader = await createPhotoReader()
  })
  afterAll(() => reader.close())

  it('are all there, with what must come out', async () => {
    const folders = (await readdir('samples', { withFileTypes: true })).filter((f) => f.isDirectory()).map((f) => f.name)
    for (const { case: name } of SAMPLE_CASES) expect(folders).toContain(name)
  })

  it('stand in the season as they were made', async () => {
    expect(JSON.parse(await readFile('samples/season.json', 'utf8'))).toEqual(SAMPLE_RUNS)
  })

  it.each(SAMPLE_CASES.map((c) => [c.case, c.why] as const))(
    '%s: %s',
    async (name) => {
      const expected = expectedSchema.parse(JSON.parse(await readFile(join('samples', name, 'expected.json'), 'utf8')))
      const { file, bytes, truths } = await openSample(name)
      const pages = (await reader.read(bytes, file)).map(toExpected)
      expect(pages.map(heads)).toEqual(expected.map(heads))
      expected.forEach((page, i) => {
        expect(worse(page, pages[i]!, truths[i])).toEqual([])
      })
      pages.forEach((page, i) => {
        const truth = truths[i]
        if (!truth || page.takeAgain) return
        expect(page.sheet).toBe(truth.sheet)
        expect(differences(page, truth)).toEqual([])
        for (const key of onPurpose(truth)) expect(page.readings[key]?.state, key).toBe('in doubt')
      })
    },
    30_000,
  )
})

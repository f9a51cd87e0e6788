import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createPhotoReader } from '../../worker/readers/photo/read-page.ts'
import { isFault, tryForeign } from '../bench/fuzz-one.ts'
import type { BenchReader } from '../bench/reading-json.ts'
import { FOREIGN_KINDS } from '../simulator/foreign.ts'

/** At least one of each kind; `npm run fuzz:read` throws 500. */
const COUNT = Math.max(40, FOREIGN_KINDS.length)

describe('damaged and foreign pictures', () => {
  let reader: BenchReader
  beforeAll(async () => {
    reader = await createPhotoReader()
  })
  afterAll(() => reader.close())

  it(`neither hang nor crash the reader, and none of ${COUNT} gives a clear reading`, async () => {
    const faults = []
    for (let n = 0; n < COUNT; n += 1) {
      const outcome = await tryForeign(reader, n)
      if (isFault(outcome)) faults.push(outcome)
    }
    expect(faults).toEqual([])
  }, 180_000)
})

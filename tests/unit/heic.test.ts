import { readFile } from 'node:fs/promises'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { createPhotoReader, type PhotoReader } from '../../worker/readers/photo/read-page.ts'

let reader: PhotoReader
beforeAll(async () => {
  reader = await createPhotoReader()
})
afterAll(() => reader.close())

/** samples/careful at three quarters of its size, written by libheif's own encoder (Debian's libheif-examples). */
test('a HEIC photo is read, and what is clear is what was written', async () => {
  const [page] = await reader.read(await readFile('tests/fixtures/careful.heic'), 'careful.heic')
  const truth = JSON.parse(await readFile('samples/careful/careful.truth.json', 'utf8')) as { readings: Record<string, unknown> }
  expect(page?.takeAgain).toBeNull()
  const readings = Object.entries(page?.readings ?? {})
  const clear = readings.filter(
    ([key, r]) => r.state === 'clear' && key in truth.readings && typeof truth.readings[key] !== 'object',
  )
  expect(clear.length).toBeGreaterThan(60)
  for (const [key, r] of clear) expect([key, r.value]).toEqual([key, truth.readings[key]])
})

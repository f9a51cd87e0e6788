import { afterAll, expect, it } from 'vitest'
import { createReadingProcess } from '../../worker/child/reading-process.ts'
import type { PagePicture } from '../../worker/jobs/page-reader.ts'

const none = new Set<number>()
const reader = createReadingProcess({
  script: 'tests/worker/bad-reader.ts',
  listKnown: async () => ({
    today: '2026-12-01',
    known: { people: none, places: none, tractors: none, implements: none, kits: new Set([31, 32]) },
  }),
})
afterAll(() => reader.close())

const never = new AbortController().signal
const pictureOf = (fileName: string): PagePicture => ({
  bytes: new Uint8Array(5),
  fileName,
  kind: 'jpeg',
  page: 1,
  placed: null,
  planned: false,
})
/** Bytes and numbers go over whole: 5 bytes and 2 kits. */
const reads = async () => {
  const { outcome } = await reader.read(pictureOf('good.jpg'), never)
  expect(outcome.kind === 'read' && outcome.readings[0]?.value).toBe(7)
}

it('a picture is read in the reading process', reads)

it('a picture that crashes the reading process is a fault, and the next picture is read', async () => {
  await expect(reader.read(pictureOf('dies.jpg'), never)).rejects.toThrow('the reading process ended (SIGSEGV)')
  await reads()
})

it('a picture that never ends is ended with its attempt, and the next picture is read', async () => {
  const attempt = new AbortController()
  const reading = reader.read(pictureOf('spins.jpg'), attempt.signal)
  setTimeout(() => attempt.abort(new Error('the attempt is over')), 1_500)
  await expect(reading).rejects.toThrow('the attempt is over')
  await reads()
})

it('a fault is told with its words', async () => {
  await expect(reader.read(pictureOf('fault.jpg'), never)).rejects.toThrow('turned to dust')
})

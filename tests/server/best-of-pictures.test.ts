import { afterAll, beforeAll, expect, test } from 'vitest'
import type { PageOutcome, ReadReading } from '../../server/db/intake/page-outcome.ts'
import { takeInPage } from '../../server/db/intake/take-in-page.ts'
import type { Sheet } from '../../shared/schemas/sheet.ts'
import { buildReadings } from '../builders/readings.ts'
import { buildOutcome, createPage, readingsOf } from '../builders/sheet.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let clerk: Awaited<ReturnType<TestServer['signIn']>>
beforeAll(async () => {
  server = await startTestServer()
  clerk = await server.signIn('clerk')
})
afterAll(() => server.close())

type Read = Extract<PageOutcome, { kind: 'read' }>
const VALUES = buildReadings({ demonstrator_id: null })
const between = (...values: number[]): ReadReading['candidates'] => values.map((value, i) => ({ value, p: 0.6 - 0.3 * i }))
const first = (doubtful: Record<string, ReadReading['candidates']> = {}) =>
  buildOutcome({ readings: readingsOf(VALUES, doubtful) }) as Read
/** The same sheet again: its readings as this picture shows them. */
const again = (sheet: Read, values: typeof VALUES, doubtful: Record<string, ReadReading['candidates']> = {}): Read => ({
  ...sheet,
  readings: readingsOf(values, doubtful),
})

async function takeIn(outcome: Read, fileName: string): Promise<string> {
  const page = await createPage(server.deps.source, clerk.user.id, { fileName })
  const { sheetId } = await server.deps.source.transaction((db) => takeInPage(db, { ...page, outcome }))
  return sheetId!
}
const open = async (id: string) => (await clerk.get(`/sheets/${id}`)).body as Sheet
const readingOf = async (id: string, key: string) => (await open(id)).readings.find((r) => r.key === key)!

test('each cell comes from the picture that is sure of it', async () => {
  const one = first({ 'depth_cm[1]': between(14, 19) })
  const id = await takeIn(one, 'one.jpg')
  expect(await takeIn(again(one, VALUES, { 'depth_cm[2]': between(15, 16) }), 'two.jpg')).toBe(id)
  expect(await readingOf(id, 'depth_cm[1]')).toMatchObject({ state: 'clear', value: VALUES['depth_cm[1]'] })
  expect(await readingOf(id, 'depth_cm[2]')).toMatchObject({ state: 'clear', value: VALUES['depth_cm[2]'] })
})

test('two sure readings that differ are a doubt that shows both', async () => {
  const one = first()
  const id = await takeIn(one, 'one.jpg')
  expect(await takeIn(again(one, { ...VALUES, pass_count: 71 }), 'two.jpg')).toBe(id)
  const reading = await readingOf(id, 'pass_count')
  expect(reading.state).toBe('in doubt')
  expect(reading.reasons[0]?.text).toBe(
    `The pictures of this sheet show different values: ${VALUES.pass_count} in one.jpg, 71 in two.jpg.`,
  )
  // A third picture does not outvote the second: pictures of one ink are no independent witnesses.
  await takeIn(again(one, VALUES), 'three.jpg')
  expect((await readingOf(id, 'pass_count')).state).toBe('in doubt')
})

test('what a person settled stays, whatever another picture shows', async () => {
  const one = first({ 'depth_cm[1]': between(14, 19) })
  const id = await takeIn(one, 'one.jpg')
  const { version } = await open(id)
  const body = { version, key: 'depth_cm[1]', how: 'corrected', value: 17.5, why: 'seen on the paper' }
  expect((await clerk.post(`/sheets/${id}/settle-reading`, body)).status).toBe(200)
  await takeIn(again(one, VALUES), 'two.jpg')
  expect(await readingOf(id, 'depth_cm[1]')).toMatchObject({ value: 17.5, settlement: 'corrected' })
})

test('a box that looks crossed out in one picture is shown to a person', async () => {
  const one = first()
  const id = await takeIn(one, 'one.jpg')
  const two = again(one, VALUES, { pass_count: between(7, 1) })
  const crossed = two.readings.find((r) => r.key === 'pass_count')!
  crossed.reasons = [{ rule: 'R01', text: 'A box of passes looks crossed out or written over.', cells: ['pass_count'] }]
  await takeIn(two, 'two.jpg')
  expect(await readingOf(id, 'pass_count')).toMatchObject({ state: 'in doubt', reasons: [{ rule: 'R01' }] })
})

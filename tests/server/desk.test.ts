import { afterAll, beforeAll, expect, test } from 'vitest'
import type { z } from 'zod'
import { takeInPage } from '../../server/db/intake/take-in-page.ts'
import type { recordListSchema, TrialRecord } from '../../shared/schemas/record.ts'
import type { Entered, Sheet } from '../../shared/schemas/sheet.ts'
import type { trailListSchema } from '../../shared/schemas/trail.ts'
import { buildReadings } from '../builders/readings.ts'
import { buildOutcome, createArrivedSheet, createGoldenRegisters, createPage, readingsOf } from '../builders/sheet.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let clerk: Awaited<ReturnType<TestServer['signIn']>>
let analyst: Awaited<ReturnType<TestServer['signIn']>>
let demonstrator: Awaited<ReturnType<TestServer['signIn']>>

beforeAll(async () => {
  server = await startTestServer()
  clerk = await server.signIn('clerk')
  analyst = await server.signIn('analyst')
  demonstrator = await server.signIn('demonstrator')
  await createGoldenRegisters(server.deps.source)
})
afterAll(() => server.close())

/** Each sheet is of an earlier day than the one before: no run clashes with another, and the hour meter never goes back. */
let day = 25
/** A person of the golden sheet's number would have to be in the register: the tests write the demonstrator's own. */
const golden = (changes = {}) =>
  buildReadings({ demonstrator_id: demonstrator.user.number, trial_date: `2026-11-${day--}`, ...changes })
const arrive = (changes = {}, doubtful = {}) =>
  createArrivedSheet(server.deps.source, demonstrator.user.id, buildOutcome({ readings: readingsOf(golden(changes), doubtful) }))
const open = async (id: string) => (await clerk.get(`/sheets/${id}`)).body as Sheet

test('a sheet whose readings are clear and agree is settled, and entering it makes a record with the golden results', async () => {
  const id = await arrive()
  const sheet = await open(id)
  expect(sheet.doubts.filter((d) => d.severity !== 'note')).toEqual([])
  expect(sheet.state).toBe('settled')
  const entered = (await clerk.post(`/sheets/${id}/enter`, { version: sheet.version })).body as Entered
  for (const find of [String(entered.recordNumber), `${sheet.code?.slice(0, 4)}-${sheet.code?.slice(4, 8).toLowerCase()}`]) {
    const { records } = (await analyst.get(`/records?find=${find}`)).body as z.infer<typeof recordListSchema>
    expect(records.map(({ number }) => number)).toEqual([entered.recordNumber])
  }
  const admin = await server.signIn('admin')
  const { entries } = (await admin.get('/trail')).body as z.infer<typeof trailListSchema>
  expect(entries.find((e) => e.subjectId === id)).toMatchObject({ action: 'entered', sheetCode: sheet.code })
  const record = (await analyst.get(`/records/${entered.recordNumber}`)).body as TrialRecord
  // DOMAIN's short golden sheet, computed independently: 14.0741 L/ha, 9.28982 mL/m³, depth 15.15 cm, width 0.908 m.
  expect(record.results.l_per_ha?.value).toBeCloseTo(14.074074, 6)
  expect(record.results.ml_per_m3?.value).toBeCloseTo(9.28982, 5)
  expect(record.results.depth_mean_cm?.value).toBeCloseTo(15.15, 10)
  expect(record.results.width_mean_m?.value).toBeCloseTo(0.908, 10)
  expect(record.tractor.name).toBe('Tarnfold 45')
  expect(record.history.map((h) => h.action)).toEqual(['read', 'entered'])
})

test('a sheet without a code names the file it came in; one with a code needs none', async () => {
  const readings = readingsOf(golden())
  const bare = await createArrivedSheet(server.deps.source, demonstrator.user.id, buildOutcome({ readings, sheetCode: null }))
  expect((await open(bare)).fileName).toBe('sheet.jpg')
  expect((await open(await arrive())).fileName).toBeNull()
})

test('a doubt is settled by a person, with who and why, and results follow', async () => {
  const id = await arrive(
    { jar_end_ml: 2600 },
    {
      jar_end_ml: [
        { value: 2600, p: 0.11, ink: 0.63 },
        { value: 2000, p: 0.88, ink: 0.34 },
      ],
    },
  )
  const before = await open(id)
  expect(before.state).toBe('waiting')
  expect(before.doubts.map((d) => d.rule)).toContain('Q08')
  const refused = await clerk.post(`/sheets/${id}/enter`, { version: before.version })
  expect(refused.status).toBe(409)
  const settled = (
    await clerk.post(`/sheets/${id}/settle-reading`, {
      version: before.version,
      key: 'jar_end_ml',
      how: 'corrected',
      value: 2000,
      why: 'the sum agrees',
    })
  ).body as Sheet
  const reading = settled.readings.find((r) => r.key === 'jar_end_ml')
  expect(reading).toMatchObject({
    value: 2000,
    readValue: 2600,
    origin: 'person',
    settlement: 'corrected',
    settledBy: clerk.user.name,
    why: 'the sum agrees',
  })
  expect(settled.state).toBe('settled')
  const undone = (await clerk.post(`/sheets/${id}/unsettle`, { version: settled.version, key: 'jar_end_ml' })).body as Sheet
  expect(undone.readings.find((r) => r.key === 'jar_end_ml')).toMatchObject({ value: 2600, origin: 'ink', settlement: null })
})

test('the second of two clerks is refused and told what changed', async () => {
  const id = await arrive(
    {},
    {
      'depth_cm[4]': [
        { value: 14, p: 0.6 },
        { value: 19, p: 0.4 },
      ],
    },
  )
  const other = await server.signIn('clerk')
  const sheet = await open(id)
  const body = { version: sheet.version, key: 'depth_cm[4]', how: 'kept' }
  expect((await other.post(`/sheets/${id}/settle-reading`, body)).status).toBe(200)
  const late = await clerk.post(`/sheets/${id}/settle-reading`, { ...body, how: 'corrected', value: 19, why: 'looks like 9' })
  expect(late.status).toBe(412)
  expect(JSON.stringify(late.body)).toContain(other.user.name)
  expect((await open(id)).readings.find((r) => r.key === 'depth_cm[4]')?.value).toBe(14)
})

test('a stop keeps its figure back until a person resolves it', async () => {
  const id = await arrive({ vent_open: false })
  const sheet = await open(id)
  const stop = sheet.doubts.find((d) => d.severity === 'stop' && d.rule === 'Q34')
  expect(stop?.cells).toContain('vent_open')
  expect((await clerk.post(`/sheets/${id}/settle-doubt`, { version: sheet.version, doubtId: stop?.id })).status).toBe(400)
  const kept = (
    await clerk.post(`/sheets/${id}/settle-doubt`, { version: sheet.version, doubtId: stop?.id, why: 'driver says it was shut' })
  ).body as Sheet
  expect(kept.doubts.filter((d) => d.severity !== 'note' && d.settledAt === null)).toEqual([])
  const entered = (await clerk.post(`/sheets/${id}/enter`, { version: kept.version })).body as Entered
  const record = (await analyst.get(`/records/${entered.recordNumber}`)).body as TrialRecord
  expect(record.results.l_per_ha?.value).toBeNull()
  expect(record.results.area_ha?.value).toBeCloseTo(0.27, 10)
})

test('a sheet is sent back with the reason by mail, and the demonstrator sees it', async () => {
  const id = await arrive({ tyre_p_unit: null })
  const sheet = await open(id)
  await clerk.post(`/sheets/${id}/send-back`, { version: sheet.version, reason: 'Which unit are the tyre pressures in?' })
  const own = (await demonstrator.get(`/sheets/${id}`)).body as Sheet
  expect(own).toMatchObject({ state: 'sent back', sentBackReason: 'Which unit are the tyre pressures in?' })
  const mails: Array<{ recipient: string; body: string }> = await server.deps.source.query('SELECT recipient, body FROM mails')
  expect(mails.find((m) => m.recipient === demonstrator.user.email)?.body).toContain('Which unit')
})

test('another picture of the same ink joins the sheet; other ink under the same code is a second sheet with a doubt', async () => {
  const first = buildOutcome({
    readings: readingsOf(
      golden({ t_start: '08:10', t_end: '09:02', jar_start_t: '08:10', jar_end_t: '09:02', 'topup_t[1]': '08:38' }),
    ),
  })
  const id = await createArrivedSheet(server.deps.source, demonstrator.user.id, first)
  expect(await createArrivedSheet(server.deps.source, demonstrator.user.id, first)).toBe(id)
  const otherInk = {
    ...first,
    readings: readingsOf(
      golden({
        side_ab_m: 81.2,
        side_bc_m: 33.1,
        hour_meter_start: 99.1,
        'depth_cm[1]': 11,
        'depth_cm[2]': 12,
        'depth_cm[3]': 12.5,
        pass_count: 31,
      }),
    ),
  }
  const second = await createArrivedSheet(server.deps.source, demonstrator.user.id, otherInk as typeof first)
  expect(second).not.toBe(id)
  expect((await open(second)).doubts.map((d) => d.rule)).toContain('Q45')
})

test('a late attempt at a page writes nothing', async () => {
  const page = await createPage(server.deps.source, demonstrator.user.id)
  const outcome = buildOutcome()
  const late = await server.deps.source.transaction((db) =>
    takeInPage(db, { pageId: page.pageId, attemptToken: '6f0c2a8e-7e0b-4f0e-9d5b-0a3f5a1c9b11', outcome }),
  )
  expect(late).toEqual({ written: false, sheetId: null })
})

test('a challenged record goes back to the desk and comes out as the next version', async () => {
  const id = await arrive()
  const entered = (await clerk.post(`/sheets/${id}/enter`, { version: (await open(id)).version })).body as Entered
  await analyst.post(`/records/${entered.recordNumber}/challenge`, { reason: 'speed cannot be' })
  const again = await open(id)
  expect(again.state).toBe('challenged')
  expect((await clerk.post(`/sheets/${id}/enter`, { version: again.version })).status).toBe(400)
  const answer = { version: again.version, answer: 'the watch was read twice' }
  const second = (await clerk.post(`/sheets/${id}/enter`, answer)).body as Entered
  expect(second).toMatchObject({ recordNumber: entered.recordNumber, version: 2 })
  expect((await open(id)).history.at(-1)?.text).toContain('answered: “the watch was read twice”')
})

test('the book downloads as CSV with units in the header, numbers untouched and live text made harmless', async () => {
  await server.deps.source.query("UPDATE places SET name = '=HYPERLINK(1)' WHERE number = 21")
  const csv = (await analyst.get('/records.csv')).bytes.toString()
  const [header, first] = csv.split('\r\n')
  expect(header).toContain('l_per_ha [L/ha]')
  expect(first).toContain("'=HYPERLINK(1)")
  expect(csv).toContain('14.074074074074')
  // The code as people see it on the sheet and on every screen.
  expect(first).toMatch(/,[0-9A-Z]{5}-[0-9A-Z]{5}-[0-9A-Z],/)
  const dictionary = (await analyst.get('/records/dictionary.csv')).bytes.toString().split('\r\n').slice(1, -1)
  expect(dictionary.map((line) => line.split(',')[0])).toEqual(header?.split(','))
  expect(header).not.toMatch(/_(sd|cv)_\w+_U/)
})

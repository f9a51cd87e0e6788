import { afterAll, beforeAll, expect, test } from 'vitest'
import type { LandUnitRow } from '../../shared/schemas/land-unit.ts'
import type { TrialRecord } from '../../shared/schemas/record.ts'
import type { RulePage } from '../../shared/schemas/rules.ts'
import type { Entered, Sheet } from '../../shared/schemas/sheet.ts'
import { buildReadings } from '../builders/readings.ts'
import { buildOutcome, createArrivedSheet, createGoldenRegisters, readingsOf } from '../builders/sheet.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let admin: Awaited<ReturnType<TestServer['signIn']>>
let clerk: Awaited<ReturnType<TestServer['signIn']>>
let demonstrator: Awaited<ReturnType<TestServer['signIn']>>

beforeAll(async () => {
  server = await startTestServer()
  admin = await server.signIn('admin')
  clerk = await server.signIn('clerk')
  demonstrator = await server.signIn('demonstrator')
  await createGoldenRegisters(server.deps.source)
})
afterAll(() => server.close())

let day = 25
const arrive = (changes = {}) =>
  createArrivedSheet(
    server.deps.source,
    demonstrator.user.id,
    buildOutcome({
      readings: readingsOf(
        buildReadings({ demonstrator_id: demonstrator.user.number, trial_date: `2026-11-${day--}`, ...changes }),
      ),
    }),
  )
const open = async (id: string) => (await clerk.get(`/sheets/${id}`)).body as Sheet
const rules = async () => (await clerk.get('/rules')).body as RulePage
const ruleOf = (page: RulePage, id: string) => page.rules.find((rule) => rule.id === id)!
const limitOf = (page: RulePage, name: string) => page.limits.find((limit) => limit.name === name)!

test('every rule stands in plain words, with its limits and how sure they are', async () => {
  const page = await rules()
  const numbers = Array.from({ length: 58 }, (_, i) => `Q${String(i + 1).padStart(2, '0')}`)
  expect(page.rules.map((rule) => rule.id)).toEqual(expect.arrayContaining(numbers))
  expect(ruleOf(page, 'Q10')).toMatchObject({ name: 'jar ran low', severity: ['doubt'], limits: ['jar_lowest_ml'] })
  expect(limitOf(page, 'jar_lowest_ml')).toMatchObject({ value: 500, usual: 500, unit: 'mL', certainty: 'common practice' })
  expect(limitOf(page, 'density_note_low').certainty).toBe('published')
  expect(page.settingsVersion).toBe(0)
})

test('a doubt counts as right when its cell was corrected, as not right when a person let it stand', async () => {
  const before = ruleOf(await rules(), 'Q12')
  const [first, second] = [await arrive({ depth_mean_written_cm: 15.9 }), await arrive({ depth_mean_written_cm: 15.9 })]
  expect(ruleOf(await rules(), 'Q12')).toMatchObject({ fired: before.fired + 2, open: before.open + 2 })
  const sheet = await open(first)
  const correction = { version: sheet.version, key: 'depth_mean_written_cm', how: 'corrected', value: 15.2, why: 'reads 15.2' }
  expect((await clerk.post(`/sheets/${first}/settle-reading`, correction)).status).toBe(200)
  const other = await open(second)
  const doubt = other.doubts.find((d) => d.rule === 'Q12')
  const stand = { version: other.version, doubtId: doubt?.id, why: 'the driver added' }
  expect((await clerk.post(`/sheets/${second}/settle-doubt`, stand)).status).toBe(200)
  const after = ruleOf(await rules(), 'Q12')
  expect(after).toMatchObject({ right: before.right + 1, letStand: before.letStand + 1, open: before.open })
})

test('limits an admin sets are a new version; open sheets are judged by it, and a record keeps the version that made it', async () => {
  const entered = await arrive()
  const early = (await clerk.post(`/sheets/${entered}/enter`, { version: (await open(entered)).version })).body as Entered
  const waiting = await arrive()
  expect((await open(waiting)).state).toBe('settled')
  const change = { limits: { jar_lowest_ml: 2500 }, why: 'the new jars draw air early', version: 0 }
  const saved = await admin.post('/rules/limits', change)
  expect(saved).toMatchObject({ status: 201, body: { settingsVersion: 1 } })
  const page = saved.body as RulePage
  expect(limitOf(page, 'jar_lowest_ml')).toMatchObject({ value: 2500, usual: 500 })
  expect(page.versions[0]).toMatchObject({ version: 1, setBy: admin.user.name, why: 'the new jars draw air early' })
  const judged = await open(waiting)
  expect(judged).toMatchObject({ state: 'waiting', facts: { settingsVersion: 1, limits: { jar_lowest_ml: 2500 } } })
  expect(judged.doubts.map((d) => d.rule)).toContain('Q10')
  const record = (await clerk.get(`/records/${early.recordNumber}`)).body as TrialRecord
  expect(record.facts.settingsVersion).toBe(0)
  const { entries } = (await admin.get('/trail')).body as { entries: Array<{ text: string }> }
  expect(entries[0]?.text).toBe('limits, version 1: jar lowest 500 to 2500 mL. “the new jars draw air early”')
  const back = await admin.post('/rules/limits', { limits: { jar_lowest_ml: null }, why: 'back again', version: 1 })
  expect(limitOf(back.body as RulePage, 'jar_lowest_ml').value).toBe(500)
  expect((await open(waiting)).state).toBe('settled')
})

test('limits made on an old version, or of no rule, are refused', async () => {
  const { settingsVersion } = await rules()
  const stale = await admin.post('/rules/limits', { limits: { late_days: 40 }, why: 'harvest', version: settingsVersion - 1 })
  expect(stale.status).toBe(412)
  const unknown = await admin.post('/rules/limits', { limits: { no_limit: 1 }, why: 'harvest', version: settingsVersion })
  expect(unknown).toMatchObject({ status: 400, body: { error: { issues: [{ path: 'limits.no_limit' }] } } })
  expect((await rules()).settingsVersion).toBe(settingsVersion)
})

test('a limit out of its range is refused, and limits in force already make no new version', async () => {
  const { settingsVersion: version } = await rules()
  const wrong = await admin.post('/rules/limits', { limits: { kit_check_months: -3 }, why: 'a slip', version })
  expect(wrong).toMatchObject({ status: 400, body: { error: { issues: [{ path: 'limits.kit_check_months' }] } } })
  const same = await admin.post('/rules/limits', { limits: { kit_check_months: 12, late_days: null }, why: 'the same', version })
  expect(same.status).toBe(409)
  expect((await rules()).settingsVersion).toBe(version)
})

test('of ten admins who set limits on one version, one is heard', async () => {
  const { settingsVersion: version } = await rules()
  const writes = Array.from({ length: 10 }, (_, i) =>
    admin.post('/rules/limits', { limits: { late_days: 31 + i }, why: 'all at once', version }),
  )
  const statuses = (await Promise.all(writes)).map(({ status }) => status).sort()
  expect(statuses).toEqual([201, ...Array(9).fill(412)])
})

test('a local unit of land is confirmed by a person, once for a district, and withdrawn', async () => {
  const unit = { name: 'bigha', district: 'Sannipur', size_m2: 1337.8, source: 'land office, Sannipur' }
  const added = await admin.post('/land-units', unit)
  expect(added).toMatchObject({ status: 201, body: { ...unit, confirmedBy: admin.user.name } })
  expect((await admin.post('/land-units', { ...unit, size_m2: 1600 })).status).toBe(409)
  const { facts } = await open(await arrive())
  expect(facts.landUnits).toEqual([
    { name: 'bigha', size_m2: 1337.8, confirmedBy: admin.user.name, confirmedOn: expect.stringMatching(/^\d{4}-\d\d-\d\d$/) },
  ])
  const { id } = added.body as LandUnitRow
  expect((await admin.delete(`/land-units/${id}`)).status).toBe(200)
  expect((await admin.delete(`/land-units/${id}`)).status).toBe(404)
  expect((await clerk.get('/land-units')).body).toEqual([])
})

test('a sheet knows what the registers and the book tell of it', async () => {
  const places = (await clerk.get('/registers/places')).body as Array<{ id: string; number: number }>
  const tractors = (await clerk.get('/registers/tractors')).body as Array<{ id: string }>
  const { id: placeId, ...place } = places[0]!
  const { id: tractorId, ...tractor } = tractors[0]!
  await admin.put(`/registers/places/${placeId}`, { ...place, lat: 20, lon: 77, density15_kgm3: 832 })
  await admin.put(`/registers/tractors/${tractorId}`, { ...tractor, rollingCircumference_m: 4.24, gearSpeeds: 'L2 3.1, L3 6.9' })
  const { body } = await admin.post('/registers/places', { number: 22, name: 'Farther', district: 'Sannipur', lat: 21, lon: 77 })
  expect(body).toMatchObject({ lat: 21, density15_kgm3: null })
  const far = await arrive({ place_id: 22, tractor_id: 13 })
  const sameDay = { trial_date: `2026-11-${day + 1}`, t_start: '10:05', t_end: '10:57', jar_start_t: '10:05', jar_end_t: '10:57' }
  const { facts, doubts } = await open(await arrive({ ...sameDay, 'topup_t[1]': '10:33' }))
  expect(facts).toMatchObject({ density15_kgm3: 832, rollingCircumference_m: 4.24, gearSpeed_km_h: 6.9 })
  // One degree of latitude is 111.2 km on a sphere of 6371 km.
  const [other] = facts.otherSheets as Array<{ distance_km: number }>
  expect(other?.distance_km).toBeCloseTo(111.19, 1)
  expect(doubts.map((d) => d.rule)).toContain('Q46')
  expect((await open(far)).id).toBe(far)
  expect(facts.peers_l_per_ha).toEqual([expect.closeTo(14.074, 3)])
})

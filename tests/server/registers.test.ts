import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Tractor } from '../../shared/schemas/register.ts'
import { REGISTER_NAMES } from '../../shared/schemas/register.ts'
import { buildImplement, buildKit, buildPlace, buildTractor } from '../builders/register.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

describe('the registers', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
  })
  afterAll(() => server.close())

  const built = { places: buildPlace(), tractors: buildTractor(), implements: buildImplement(), kits: buildKit() }

  it.each(REGISTER_NAMES)('take a row of %s from an admin and show it to everybody who is signed in', async (name) => {
    const admin = await server.signIn('admin')
    const added = await admin.post(`/registers/${name}`, built[name])
    expect(added).toMatchObject({ status: 201, body: { ...built[name], version: 1 } })
    const clerk = await server.signIn('clerk')
    expect((await clerk.get(`/registers/${name}`)).body).toEqual([added.body])
    expect((await clerk.post(`/registers/${name}`, built[name])).status).toBe(403)
  })

  it('hold every number once', async () => {
    const admin = await server.signIn('admin')
    const first = buildPlace()
    await admin.post('/registers/places', first)
    const second = await admin.post('/registers/places', buildPlace({ number: first.number }))
    expect(second).toMatchObject({ status: 409, body: { error: { code: 'conflict', issues: [{ path: 'number' }] } } })
  })

  it('refuse a write on an old version and say who changed what', async () => {
    const admin = await server.signIn('admin')
    const other = await server.signIn('admin')
    const { body } = await admin.post('/registers/tractors', buildTractor({ ratedRpm: 2200 }))
    const { id, ...row } = body as Tractor
    const saved = await other.put(`/registers/tractors/${id}`, { ...row, ratedRpm: 2300 })
    expect(saved).toMatchObject({ status: 200, body: { ratedRpm: 2300, version: 2 } })
    const stale = await admin.put(`/registers/tractors/${id}`, { ...row, tyreRear: '18.4-30' })
    expect(stale).toMatchObject({ status: 412, body: { error: { code: 'changed' } } })
    const { message, issues } = (stale.body as { error: { message: string; issues: unknown[] } }).error
    expect(message).toContain(other.user.name)
    expect(issues).toContainEqual({ path: 'ratedRpm', message: 'rated speed is now 2300 r/min' })
    const rows = (await admin.get('/registers/tractors')).body as Tractor[]
    expect(rows.find((tractor) => tractor.id === id)).toMatchObject({ ratedRpm: 2300, tyreRear: row.tyreRear })
  })

  it('take one of twenty writes made on the same version, and refuse the others', async () => {
    const admin = await server.signIn('admin')
    const { body } = await admin.post('/registers/places', buildPlace())
    const { id, ...row } = body as { id: string; number: number }
    const writes = Array.from({ length: 20 }, (_, i) => admin.put(`/registers/places/${id}`, { ...row, name: `Name ${i}` }))
    const statuses = (await Promise.all(writes)).map(({ status }) => status).sort()
    expect(statuses).toEqual([200, ...Array(19).fill(412)])
  })

  it('refuse a write that names no version', async () => {
    const admin = await server.signIn('admin')
    const { body } = await admin.post('/registers/kits', buildKit())
    const { id, version: _, ...row } = body as { id: string; version: number }
    expect(await admin.put(`/registers/kits/${id}`, row)).toMatchObject({
      status: 428,
      body: { error: { code: 'version_needed' } },
    })
  })

  it('say in the trail what changed from what to what', async () => {
    const admin = await server.signIn('admin')
    const { body } = await admin.post('/registers/implements', buildImplement({ ratedWidth_m: 0.9 }))
    const { id, ...row } = body as { id: string; name: string }
    await admin.put(`/registers/implements/${id}`, { ...row, ratedWidth_m: 1.05 })
    const { entries } = (await admin.get('/trail')).body as { entries: { subjectId: string; text: string }[] }
    const [latest] = entries.filter(({ subjectId }) => subjectId === id)
    expect(latest?.text).toContain('rated width 0.9 to 1.05 m')
  })
})

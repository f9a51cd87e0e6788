import { createHash } from 'node:crypto'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { blankLateArrival } from '../../server/print/blank-pictures.ts'
import { cellBounds } from '../../shared/layouts/geometry.ts'
import { isComb } from '../../shared/layouts/layout.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Demonstration } from '../../shared/schemas/demonstration.ts'
import type { User } from '../../shared/schemas/user.ts'
import { preparePlan } from '../builders/demonstration.ts'
import { buildReadings } from '../builders/readings.ts'
import { buildOutcome, createArrivedSheet, createGoldenRegisters, readingsOf } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

const SIZE_PX = { width: 1240, height: 1754 }
const PX_PER_MM = SIZE_PX.width / 210

/** A page that is black all over: whatever is not black afterwards was covered. */
const blackPage = () =>
  sharp({ create: { ...SIZE_PX, channels: 3, background: '#000000' } })
    .jpeg()
    .toBuffer()

describe('withdrawing consent', () => {
  let server: TestServer
  let agent: TestAgent & { user: User }
  beforeAll(async () => {
    server = await startTestServer()
    await createGoldenRegisters(server.deps.source)
    agent = await server.signIn('demonstrator')
  })
  afterAll(() => server.close())

  /** A demonstration whose first sheet came back as a photo; the original and the flattened picture are both kept. */
  async function photographed() {
    const plan = await preparePlan(server.deps.source.manager, agent.user.id)
    const planned = (await agent.post('/demonstrations', plan)).body as Demonstration
    return { planned, ...(await photograph(planned, 0)) }
  }

  async function photograph(planned: Demonstration, run: number) {
    const { source, files } = server.deps
    // What the plan knows has no boxes on a planned sheet.
    const printed = new Set(tillage1.cells.flatMap((cell) => (isComb(cell) && cell.planned ? [cell.key] : [])))
    const readings = readingsOf(buildReadings()).filter(({ key }) => !printed.has(key))
    const sheetCode = planned.trials[0]?.runs[run]?.sheetCode ?? null
    const sheetId = await createArrivedSheet(source, agent.user.id, buildOutcome({ readings, sheetCode, planned: true }))
    const [page]: { id: string; uploadId: string }[] = await source.query(
      'SELECT id, upload_id AS "uploadId" FROM pages WHERE sheet_id = $1',
      [sheetId],
    )
    const keys = { picture: `pictures/${page?.id}/first`, original: `uploads/${page?.uploadId}` }
    for (const key of Object.values(keys)) await files.put(key, await blackPage())
    await source.query(
      `UPDATE pages SET picture_key = $2, reading = '{"planText": ["farmer Matis Orrel"], "key": 1}' WHERE id = $1`,
      [page?.id, keys.picture],
    )
    await source.query(`UPDATE uploads SET storage_key = $2, kind = 'png' WHERE id = $1`, [page?.uploadId, keys.original])
    return { sheetId, pageId: page?.id ?? '', uploadId: page?.uploadId ?? '', keys }
  }

  const brightness = async (picture: Buffer, x_mm: number, y_mm: number) => {
    const at = { left: Math.round(x_mm * PX_PER_MM), top: Math.round(y_mm * PX_PER_MM), width: 1, height: 1 }
    return (await sharp(picture).extract(at).raw().toBuffer())[0] ?? 0
  }

  it('erases name and phone, covers signatures and names in picture and original, and keeps the readings', async () => {
    const { planned, sheetId, pageId, keys } = await photographed()
    const answer = await agent.post(`/demonstrations/${planned.id}/withdraw-consent`, { reason: 'asked for by telephone' })
    expect(answer).toMatchObject({ status: 200, body: { farmer: null, version: planned.version + 1 } })
    for (const which of ['picture', 'original']) {
      const { status, headers, bytes } = await agent.get(`/pages/${pageId}/${which}`)
      expect([status, headers.get('content-type')]).toEqual([200, 'image/jpeg'])
      for (const cell of tillage1.cells.filter((c) => 'personal' in c && c.personal)) {
        const { x, y, width, height } = cellBounds(cell)
        expect(await brightness(bytes, x + width / 2, y + height / 2), cell.key).toBeGreaterThan(150)
      }
      const { x, y, rowHeight } = tillage1.planBlock
      expect(await brightness(bytes, x + 20, y + 2 * rowHeight + 1)).toBeGreaterThan(150)
      expect(await brightness(bytes, 105, 150)).toBeLessThan(20)
    }
    for (const key of Object.values(keys)) expect(await server.deps.files.exists(key)).toBe(false)
    const left: unknown = await server.deps.source.query('SELECT name FROM farmers')
    expect(left).toEqual([])
    const [page]: { reading: unknown }[] = await server.deps.source.query('SELECT reading FROM pages WHERE id = $1', [pageId])
    expect(page?.reading).toEqual({ key: 1 })
    const clerk = await server.signIn('clerk')
    const sheet = (await clerk.get(`/sheets/${sheetId}`)).body as { readings: unknown[] }
    expect(sheet.readings.length).toBeGreaterThan(50)
  })

  it('leaves the boxes alone that an unplanned sheet has where a planned one names the farmer', async () => {
    const { planned, pageId, sheetId } = await photographed()
    await server.deps.source.query('UPDATE sheets SET planned = false WHERE id = $1', [sheetId])
    await agent.post(`/demonstrations/${planned.id}/withdraw-consent`, { reason: 'asked for' })
    const { bytes } = await agent.get(`/pages/${pageId}/picture`)
    const { x, y, rowHeight } = tillage1.planBlock
    expect(await brightness(bytes, x + 20, y + 2 * rowHeight + 1)).toBeLessThan(20)
  })

  it('leaves a salted hash in the trail, and the name nowhere', async () => {
    const { planned } = await photographed()
    await agent.post(`/demonstrations/${planned.id}/withdraw-consent`, { reason: 'sold the farm' })
    const rows: { details: { farmer?: { salt: string; sha256: string } } }[] = await server.deps.source.query(
      `SELECT * FROM trail WHERE subject_id = $1 ORDER BY id DESC`,
      [planned.id],
    )
    const kept = rows[0]?.details.farmer
    expect(kept?.sha256).toBe(createHash('sha256').update(`${kept?.salt}|Matis Orrel|0555 0142`).digest('hex'))
    const whole: { row: string }[] = await server.deps.source.query('SELECT trail::text AS row FROM trail')
    expect(whole.map(({ row }) => row).join()).not.toMatch(/Matis|0555 0142/)
  })

  it('waits until a file is read to its end, and keeps the numbers of its pages', async () => {
    const { source } = server.deps
    const { planned, uploadId, pageId } = await photographed()
    const addPage = `INSERT INTO pages (upload_id, number, state) VALUES ($1, $2, $3) RETURNING id`
    const [second]: { id: string }[] = await source.query(addPage, [uploadId, 2, 'arrived'])
    await source.query('UPDATE pages SET number = 3 WHERE id = $1', [pageId])
    await source.query(addPage, [uploadId, 1, 'unreadable'])
    const path = `/demonstrations/${planned.id}/withdraw-consent`
    expect((await agent.post(path, { reason: 'asked for' })).status).toBe(409)
    expect((await agent.get(`/demonstrations/${planned.id}`)).body).toMatchObject({ farmer: { name: 'Matis Orrel' } })
    await source.query(`UPDATE pages SET state = 'unreadable' WHERE id = $1`, [second?.id])
    expect((await agent.post(path, { reason: 'asked for' })).status).toBe(200)
    const { headers, bytes } = await agent.get(`/pages/${pageId}/original`)
    expect(headers.get('content-type')).toBe('application/pdf')
    expect(bytes.toString('latin1').match(/\/Type \/Page\b/g)).toHaveLength(3)
  })

  it('removes a picture whole that no layout could be laid on, and its original', async () => {
    const { planned, pageId, sheetId } = await photographed()
    await server.deps.source.query(`UPDATE pages SET state = 'unreadable' WHERE id = $1`, [pageId])
    await server.deps.source.query(`UPDATE sheets SET state = 'unreadable' WHERE id = $1`, [sheetId])
    await agent.post(`/demonstrations/${planned.id}/withdraw-consent`, { reason: 'asked for' })
    expect((await agent.get(`/pages/${pageId}/picture`)).status).toBe(404)
    expect((await agent.get(`/pages/${pageId}/original`)).status).toBe(410)
  })

  it('covers what comes in after it, too', async () => {
    const { source, files } = server.deps
    const { planned } = await photographed()
    await agent.post(`/demonstrations/${planned.id}/withdraw-consent`, { reason: 'asked for' })
    const late = await photograph(planned, 1)
    expect(await blankLateArrival({ source, files }, late.uploadId)).toBe(true)
    for (const which of ['picture', 'original']) {
      const { bytes } = await agent.get(`/pages/${late.pageId}/${which}`)
      const farmer = cellBounds(tillage1.cells.find((cell) => cell.key === 'sign_farmer')!)
      expect(await brightness(bytes, farmer.x + farmer.width / 2, farmer.y + farmer.height / 2)).toBeGreaterThan(150)
    }
    const other = await photographed()
    expect(await blankLateArrival({ source, files }, other.uploadId)).toBe(false)
    expect(await files.exists(other.keys.original)).toBe(true)
  })

  it('is done once, and a saved plan does not bring the name back', async () => {
    const { planned } = await photographed()
    const path = `/demonstrations/${planned.id}`
    expect((await agent.post(`${path}/withdraw-consent`, { reason: 'asked for' })).status).toBe(200)
    expect((await agent.post(`${path}/withdraw-consent`, { reason: 'asked for' })).status).toBe(409)
    const { trials, heldOn, place, driver, version } = (await agent.get(path)).body as Demonstration
    const [trial] = trials
    const again = await agent.put(path, {
      heldOn,
      driver,
      placeId: place.id,
      demonstratorId: agent.user.id,
      farmer: { name: 'Matis Orrel', phone: '' },
      trials: [
        { tractorId: trial?.tractor.id, implementId: trial?.implement.id, kitId: trial?.kit.id, plot: trial?.plot, runs: 2 },
      ],
      version,
    })
    expect(again).toMatchObject({ status: 200, body: { farmer: null } })
  })
})

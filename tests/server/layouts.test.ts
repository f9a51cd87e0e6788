import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { describeLayout } from '../../shared/layouts/geometry.ts'
import { LAYOUTS } from '../../shared/layouts/registry.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

describe('a layout', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
  })
  afterAll(() => server.close())

  it('is listed, and described as the printer and the reader know it', async () => {
    const agent = await server.signIn('analyst')
    expect((await agent.get('/layouts')).body).toEqual(LAYOUTS.map(({ key, version, title }) => ({ key, version, title })))
    const described = (await agent.get('/layouts/tillage')).body
    expect(described).toEqual(JSON.parse(JSON.stringify(describeLayout(LAYOUTS[0]!))))
  })

  it.each([
    ['blank.pdf', 'application/pdf', '%PDF-'],
    ['form.xlsx', 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet', 'PK\u0003\u0004'],
    ['form.csv', 'text/csv; charset=utf-8', ''],
    ['dictionary.csv', 'text/csv; charset=utf-8', ''],
  ])('comes as %s', async (ending, type, begins) => {
    const agent = await server.signIn('demonstrator')
    const file = await agent.get(`/layouts/tillage/${ending}`)
    expect([file.status, file.headers.get('content-type')]).toEqual([200, type])
    expect(file.bytes.subarray(0, begins.length).toString('latin1')).toBe(begins)
    expect(file.bytes.length).toBeGreaterThan(500)
    expect(file.headers.get('content-disposition')).toContain(ending)
  })

  it('that does not exist is not found', async () => {
    const agent = await server.signIn('clerk')
    expect(await agent.get('/layouts/harvest')).toMatchObject({ status: 404, body: { error: { code: 'not_found' } } })
  })
})

import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { parseSheetCode } from '../../shared/layouts/sheet-code.ts'
import type { Demonstration } from '../../shared/schemas/demonstration.ts'
import { preparePlan } from '../builders/demonstration.ts'
import { createTractor } from '../builders/register.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

describe('a demonstration', () => {
  let server: TestServer
  beforeAll(async () => {
    server = await startTestServer()
  })
  afterAll(() => server.close())

  const db = () => server.deps.source.manager
  const plan = async () => {
    const agent = await server.signIn('demonstrator')
    const input = await preparePlan(db(), agent.user.id)
    const answer = await agent.post('/demonstrations', input)
    expect(answer).toMatchObject({ status: 201 })
    return { agent, input, planned: answer.body as Demonstration }
  }
  const runsOf = (planned: Demonstration) => planned.trials.flatMap((trial) => trial.runs)
  const arrive = (sheetId: string | null) =>
    server.deps.source.query(`UPDATE sheets SET state = 'waiting', arrived_at = now() WHERE id = $1`, [sheetId])

  it('gives every run a printed sheet with a code of its own', async () => {
    const { planned } = await plan()
    const runs = runsOf(planned)
    expect(runs.map((run) => [run.number, run.sheetState])).toEqual([
      [1, 'printed'],
      [2, 'printed'],
    ])
    const codes = runs.map((run) => run.sheetCode ?? '')
    expect(new Set(codes).size).toBe(2)
    for (const code of codes) expect(parseSheetCode(code)).toBe(code)
  })

  it('prints its sheets, one a page, with the same codes again', async () => {
    const { agent, planned } = await plan()
    const first = await agent.get(`/demonstrations/${planned.id}/sheets.pdf`)
    expect([first.status, first.headers.get('content-type')]).toEqual([200, 'application/pdf'])
    expect(first.bytes.toString('latin1').match(/\/Type \/Page\b/g)).toHaveLength(2)
    const [run] = runsOf(planned)
    const one = await agent.get(`/sheets/${run?.sheetId}/sheet.pdf`)
    expect(one.bytes.toString('latin1').match(/\/Type \/Page\b/g)).toHaveLength(1)
    const again = (await agent.get(`/demonstrations/${planned.id}`)).body as Demonstration
    expect(runsOf(again).map((r) => r.sheetCode)).toEqual(runsOf(planned).map((r) => r.sheetCode))
  })

  it('is not there for another demonstrator, nor are its sheets', async () => {
    const { planned } = await plan()
    const other = await server.signIn('demonstrator')
    const [run] = runsOf(planned)
    for (const path of [
      `/demonstrations/${planned.id}`,
      `/demonstrations/${planned.id}/sheets.pdf`,
      `/sheets/${run?.sheetId}/sheet.pdf`,
    ])
      expect((await other.get(path)).status).toBe(404)
    expect((await other.get('/demonstrations')).body).toEqual([])
  })

  it('is planned by a demonstrator for themselves, by an admin for anybody', async () => {
    const agent = await server.signIn('demonstrator')
    const other = await server.signIn('demonstrator')
    const input = await preparePlan(db(), other.user.id)
    expect((await agent.post('/demonstrations', input)).status).toBe(403)
    const admin = await server.signIn('admin')
    expect((await admin.post('/demonstrations', input)).status).toBe(201)
    const list = (await other.get('/demonstrations')).body
    expect(list).toMatchObject([{ trials: 1, runs: 2, sheetsArrived: 0, records: 0 }])
  })

  it('does not show the farmer to an analyst', async () => {
    const { agent, planned } = await plan()
    const analyst = await server.signIn('analyst')
    expect((await analyst.get(`/demonstrations/${planned.id}`)).body).toMatchObject({ farmer: null })
    expect((await agent.get(`/demonstrations/${planned.id}`)).body).toMatchObject({ farmer: { name: 'Matis Orrel' } })
  })

  it('keeps the sheets of runs that stay, and takes out those that have not arrived', async () => {
    const { agent, input, planned } = await plan()
    const [trial] = input.trials
    const more = await agent.put(`/demonstrations/${planned.id}`, {
      ...input,
      trials: [
        { ...trial, runs: 3 },
        { ...trial, plot: 'lower', runs: 1 },
      ],
      version: planned.version,
    })
    expect(more.status).toBe(200)
    const grown = more.body as Demonstration
    expect(runsOf(grown)).toHaveLength(4)
    expect(grown.trials[0]?.runs.slice(0, 2)).toEqual(planned.trials[0]?.runs)
    const less = await agent.put(`/demonstrations/${planned.id}`, {
      ...input,
      trials: [{ ...trial, runs: 1 }],
      version: grown.version,
    })
    expect(runsOf(less.body as Demonstration)).toEqual(runsOf(planned).slice(0, 1))
  })

  it('does not lose a run whose sheet has arrived, nor swap its tractor', async () => {
    const { agent, input, planned } = await plan()
    const [trial] = input.trials
    await arrive(runsOf(planned)[1]?.sheetId ?? null)
    const version = planned.version
    const fewer = await agent.put(`/demonstrations/${planned.id}`, { ...input, trials: [{ ...trial, runs: 1 }], version })
    expect(fewer).toMatchObject({ status: 409, body: { error: { code: 'conflict' } } })
    const tractor = await createTractor(db())
    const swapped = await agent.put(`/demonstrations/${planned.id}`, {
      ...input,
      trials: [{ ...trial, tractorId: tractor.id }],
      version,
    })
    expect(swapped.status).toBe(409)
    const standing = (await agent.get(`/demonstrations/${planned.id}`)).body as Demonstration
    expect(standing).toMatchObject({ version, trials: [{ runs: [{}, { sheetState: 'waiting' }] }] })
  })

  it('prints each trial on the layout chosen; another choice makes new sheets, with new codes', async () => {
    const { agent, input, planned } = await plan()
    const [trial] = input.trials
    const choose = (layout: string, version: number) =>
      agent.put(`/demonstrations/${planned.id}`, { ...input, trials: [{ ...trial, layout }], version })
    const layouts = async () =>
      (await server.deps.source.query('SELECT layout_key FROM sheets WHERE code = ANY($1)', [codesOf(now)])) as unknown[]
    const codesOf = (day: Demonstration) => runsOf(day).map((run) => run.sheetCode)
    expect(planned.trials[0]?.layout).toBe('tillage')
    let now = (await choose('haulage', planned.version)).body as Demonstration
    expect(now.trials).toMatchObject([{ layout: 'haulage', runs: [{ number: 1 }, { number: 2 }] }])
    expect(codesOf(now).filter((code) => codesOf(planned).includes(code))).toEqual([])
    expect(await layouts()).toEqual([{ layout_key: 'haulage' }, { layout_key: 'haulage' }])
    expect((await agent.get(`/demonstrations/${planned.id}/sheets.pdf`)).status).toBe(200)
    now = (await choose('haulage', now.version)).body as Demonstration
    await arrive(runsOf(now)[0]?.sheetId ?? null)
    expect(await choose('tillage', now.version)).toMatchObject({ status: 409, body: { error: { code: 'conflict' } } })
    expect(await choose('ploughing', now.version)).toMatchObject({ status: 400, body: { error: { code: 'invalid' } } })
  })

  it('refuses a plan made on an old version, or on none', async () => {
    const { agent, input, planned } = await plan()
    await agent.put(`/demonstrations/${planned.id}`, { ...input, driver: 'T. Vesk', version: planned.version })
    const stale = await agent.put(`/demonstrations/${planned.id}`, { ...input, version: planned.version })
    expect(stale).toMatchObject({ status: 412, body: { error: { code: 'changed' } } })
    expect((await agent.put(`/demonstrations/${planned.id}`, input)).status).toBe(428)
  })

  it('names only what the registers hold', async () => {
    const agent = await server.signIn('demonstrator')
    const input = await preparePlan(db(), agent.user.id)
    const unknown = await agent.post('/demonstrations', { ...input, placeId: '00000000-0000-4000-8000-000000000000' })
    expect(unknown).toMatchObject({ status: 400, body: { error: { code: 'invalid' } } })
  })

  it('tells the trail the day and the runs, and never the farmer', async () => {
    const { planned } = await plan()
    const rows: { text: string; details: unknown }[] = await server.deps.source.query(
      'SELECT text, details FROM trail WHERE subject_id = $1',
      [planned.id],
    )
    expect(rows[0]?.text).toContain('trials: 1, runs: 2')
    expect(JSON.stringify(rows)).not.toMatch(/Matis Orrel|0555 0142/)
  })
})

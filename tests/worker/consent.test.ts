import { randomBytes } from 'node:crypto'
import sharp from 'sharp'
import { afterAll, beforeAll, expect, it } from 'vitest'
import { cellBounds } from '../../shared/layouts/geometry.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Demonstration } from '../../shared/schemas/demonstration.ts'
import type { Upload } from '../../shared/schemas/upload.ts'
import { pageReadJob } from '../../worker/jobs/page-read.job.ts'
import { preparePlan } from '../builders/demonstration.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import { startTestServer, type TestServer } from '../support/server.ts'
import { readOutcome } from './outcomes.ts'

const PX_PER_MM = 150 / 25.4
const PAGE = { width: 1240, height: 1754, channels: 3, background: '#000000' } as const

let server: TestServer
beforeAll(async () => {
  server = await startTestServer()
  await createGoldenRegisters(server.deps.source)
})
afterAll(() => server.close())

it('a sheet photographed after consent was withdrawn is covered as soon as it is read', async () => {
  const agent = await server.signIn('demonstrator')
  const plan = await preparePlan(server.deps.source.manager, agent.user.id)
  const planned = (await agent.post('/demonstrations', plan)).body as Demonstration
  expect((await agent.post(`/demonstrations/${planned.id}/withdraw-consent`, { reason: 'asked for' })).status).toBe(200)

  const form = new FormData()
  const photo = await sharp(randomBytes(64 * 48 * 3), { raw: { width: 64, height: 48, channels: 3 } })
    .jpeg()
    .toBuffer()
  form.append('files', new File([photo], 'late.jpg'))
  const pageId = ((await agent.send('/uploads', form)).body as { uploads: Upload[] }).uploads[0]!.pages[0]!.id
  // All black: whatever is not black afterwards was covered.
  const picture = await sharp({ create: PAGE }).jpeg().toBuffer()
  const sheetCode = planned.trials[0]!.runs[0]!.sheetCode
  const job = pageReadJob({
    source: server.deps.source,
    files: server.deps.files,
    reader: {
      read: async () => ({ outcome: { ...readOutcome(), sheetCode, planned: true }, picture }),
      close: async () => undefined,
    },
  })
  expect(await job.handle({ pageId }, { signal: new AbortController().signal })).toBe('done')

  const { x, y, width, height } = cellBounds(tillage1.cells.find((cell) => cell.key === 'sign_farmer')!)
  const at = { left: Math.round((x + width / 2) * PX_PER_MM), top: Math.round((y + height / 2) * PX_PER_MM), width: 1, height: 1 }
  for (const which of ['picture', 'original']) {
    const { status, bytes } = await agent.get(`/pages/${pageId}/${which}`)
    expect(status).toBe(200)
    expect((await sharp(bytes).extract(at).raw().toBuffer())[0]).toBeGreaterThan(150)
  }
})

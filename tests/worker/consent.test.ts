import { randomBytes } from 'node:crypto'
import sharp from 'sharp'
import { afterAll, beforeAll, expect, it } from 'vitest'
import type { FileStore } from '../../server/storage/store.ts'
import { TransientError } from '../../shared/errors.ts'
import { cellBounds } from '../../shared/layouts/geometry.ts'
import { tillage1 } from '../../shared/layouts/tillage-1.ts'
import type { Demonstration } from '../../shared/schemas/demonstration.ts'
import type { Upload } from '../../shared/schemas/upload.ts'
import { pageReadJob } from '../../worker/jobs/page-read.job.ts'
import { preparePlan } from '../builders/demonstration.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
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

/** A planned sheet whose farmer has withdrawn consent, and a photo of it that waits to be read. */
async function latePhoto() {
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
  return { agent, pageId, sheetCode: planned.trials[0]!.runs[0]!.sheetCode! }
}

/** Reads the photo as that sheet; all black, so that whatever is not black afterwards was covered. */
async function jobFor(sheetCode: string, files: FileStore) {
  const picture = await sharp({ create: PAGE }).jpeg().toBuffer()
  return pageReadJob({
    source: server.deps.source,
    files,
    reader: {
      read: async () => ({ outcome: { ...readOutcome(), sheetCode, planned: true }, picture }),
      close: async () => undefined,
    },
  })
}

async function expectCovered(agent: TestAgent, pageId: string): Promise<void> {
  const { x, y, width, height } = cellBounds(tillage1.cells.find((cell) => cell.key === 'sign_farmer')!)
  const at = { left: Math.round((x + width / 2) * PX_PER_MM), top: Math.round((y + height / 2) * PX_PER_MM), width: 1, height: 1 }
  for (const which of ['picture', 'original']) {
    const { status, bytes } = await agent.get(`/pages/${pageId}/${which}`)
    expect(status).toBe(200)
    expect((await sharp(bytes).extract(at).raw().toBuffer())[0]).toBeGreaterThan(150)
  }
}

const signal = new AbortController().signal

it('a sheet photographed after consent was withdrawn is covered as soon as it is read', async () => {
  const { agent, pageId, sheetCode } = await latePhoto()
  const job = await jobFor(sheetCode, server.deps.files)
  expect(await job.handle({ pageId }, { signal })).toBe('done')
  await expectCovered(agent, pageId)
})

it('is covered when the store is back, even where every attempt to read the page is used up', async () => {
  const { agent, pageId, sheetCode } = await latePhoto()
  let puts = 0
  const away: FileStore = {
    ...server.deps.files,
    put: async (key, bytes) => {
      puts += 1
      if (puts > 1) throw new TransientError('The file store does not answer.')
      await server.deps.files.put(key, bytes)
    },
  }
  const failing = await jobFor(sheetCode, away)
  for (let attempt = 0; attempt < 3; attempt += 1) {
    await expect(failing.handle({ pageId }, { signal })).rejects.toThrow('does not answer')
  }
  await expect(failing.giveUp({ pageId })).rejects.toThrow('does not answer')
  await (await jobFor(sheetCode, server.deps.files)).giveUp({ pageId })
  await expectCovered(agent, pageId)
})

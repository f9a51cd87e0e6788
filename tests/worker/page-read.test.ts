import { afterAll, beforeAll, expect, it } from 'vitest'
import { listKnownNumbers } from '../../server/db/repositories/known-numbers.ts'
import { takePage } from '../../server/db/repositories/page.ts'
import { withClient } from '../../server/postgres/roles.ts'
import { createReadingProcess } from '../../worker/child/reading-process.ts'
import { checkHandlers } from '../../worker/jobs/job-handler.ts'
import { pageReadJob } from '../../worker/jobs/page-read.job.ts'
import type { PageReader, ReadPicture } from '../../worker/jobs/page-reader.ts'
import { waitFor } from '../support/wait-for.ts'
import { readOutcome } from './outcomes.ts'
import { createSetting, gate, memoryStore, noneOf, type Setting } from './setting.ts'

let setting: Setting
beforeAll(async () => {
  setting = await createSetting()
})
afterAll(() => setting.close())

const PICTURE = new Uint8Array([1, 2, 3])
const others = () => noneOf('upload-split', 'mail-send')
const signal = new AbortController().signal

/** A reader that does what the test says with each file. */
const readerThat = (read: (fileName: string) => Promise<ReadPicture> | ReadPicture): PageReader => ({
  read: async ({ fileName }) => read(fileName),
  close: async () => undefined,
})
const reads = (): ReadPicture => ({ outcome: readOutcome(), picture: null })

const sheetOf = async (pageId: string) => {
  const rows = await setting.source.query('SELECT s.* FROM sheets s JOIN pages p ON p.sheet_id = s.id WHERE p.id = $1', [pageId])
  return rows[0]
}

it('two workers on one queue read each page once', async () => {
  const seen: string[][] = [[], []]
  const files = memoryStore()
  const workers = await Promise.all(
    seen.map((list) =>
      setting.start((source) => [
        ...others(),
        pageReadJob({
          source,
          files,
          reader: readerThat((fileName) => {
            list.push(fileName)
            return reads()
          }),
        }),
      ]),
    ),
  )
  const pages = await Promise.all(Array.from({ length: 30 }, (_, i) => setting.addPage(`two-${i}.jpg`)))
  for (const page of pages) await setting.waitForState(page, 'read')
  await Promise.all(workers.map((worker) => worker.stop(5_000)))
  const all = seen.flat()
  expect(all).toHaveLength(30)
  expect(new Set(all).size).toBe(30)
  expect(seen.every((list) => list.length > 0)).toBe(true)
  const sheets = await setting.source.query('SELECT count(DISTINCT sheet_id) AS n FROM pages WHERE id = ANY($1)', [pages])
  expect(Number(sheets[0].n)).toBe(30)
})

it('an attempt that lost its page writes nothing and ends nothing', async () => {
  const files = memoryStore()
  const slow = gate()
  const late = pageReadJob({
    source: setting.source,
    files,
    reader: readerThat(async () => {
      await slow.pass()
      return { outcome: readOutcome(1111), picture: PICTURE }
    }),
  })
  const prompt = pageReadJob({
    source: setting.source,
    files,
    reader: readerThat(() => ({ outcome: readOutcome(2222), picture: PICTURE })),
  })
  const pageId = await setting.addPage('late.jpg')
  const ending = late.handle({ pageId }, { signal })
  await slow.arrived
  expect(await prompt.handle({ pageId }, { signal })).toBe('done')
  const after = await setting.pageOf(pageId)
  slow.open()
  expect(await ending).toBe('late')
  expect(await setting.pageOf(pageId)).toEqual(after)
  const rows = await setting.source.query('SELECT value FROM readings WHERE sheet_id = $1', [after.sheetId])
  expect(rows).toEqual([{ value: 2222 }])
  expect([...files.kept.keys()]).toEqual([after.pictureKey])
})

it('an attempt that fails after losing its page leaves the job to the other', async () => {
  const slow = gate()
  const fails = pageReadJob({
    source: setting.source,
    files: memoryStore(),
    reader: readerThat(async () => {
      await slow.pass()
      throw new Error('the picture turned to dust')
    }),
  })
  const pageId = await setting.addPage('dust.jpg')
  const ending = fails.handle({ pageId }, { signal })
  await slow.arrived
  await takePage(setting.source.manager, pageId)
  slow.open()
  expect(await ending).toBe('late')
})

it('a page that was read is not read again', async () => {
  const pageId = await setting.addPage('twice.jpg')
  let count = 0
  const job = pageReadJob({
    source: setting.source,
    files: memoryStore(),
    reader: readerThat(() => {
      count += 1
      return reads()
    }),
  })
  await job.handle({ pageId }, { signal })
  await job.handle({ pageId }, { signal })
  expect(count).toBe(1)
})

it('a page that fails three times becomes an unreadable sheet with its reason', async () => {
  let count = 0
  const worker = await setting.start((source) => [
    ...others(),
    pageReadJob({
      source,
      files: memoryStore(),
      reader: readerThat((fileName) => {
        if (fileName !== 'broken.jpg') return reads()
        count += 1
        throw new Error('the picture turned to dust')
      }),
    }),
  ])
  const pageId = await setting.addPage('broken.jpg')
  await setting.waitForState(pageId, 'unreadable', 30_000)
  await worker.stop(5_000)
  expect(count).toBe(3)
  expect(await sheetOf(pageId)).toMatchObject({
    state: 'unreadable',
    reason: expect.stringMatching(/three attempts.*key the sheet beside the picture/i),
  })
})

it('a picture that crashes its reader costs no worker: it is unreadable with its reason, and the next picture is read', async () => {
  const reader = createReadingProcess({
    script: 'tests/worker/bad-reader.ts',
    listKnown: () => listKnownNumbers(setting.source.manager),
  })
  const worker = await setting.start((source) => [...others(), pageReadJob({ source, files: memoryStore(), reader })])
  const crashing = await setting.addPage('dies.jpg')
  const good = await setting.addPage('good.jpg')
  // G-R6: shown as failed, with a reason, within two minutes; here three starts of a process and two retry delays.
  await setting.waitForState(crashing, 'unreadable', 40_000)
  await setting.waitForState(good, 'read')
  expect(await setting.pageOf(crashing)).toMatchObject({ attempts: 4 })
  expect((await sheetOf(crashing)).reason).toContain('likely damaged')
  await worker.stop(5_000)
  await reader.close()
})

it('a page whose sessions the database ends is read nevertheless, and the worker goes on', async () => {
  const slow = gate()
  const worker = await setting.start((source) => [
    ...others(),
    pageReadJob({
      source,
      files: memoryStore(),
      reader: readerThat(async (fileName) => {
        if (fileName === 'during.jpg') await slow.pass()
        return reads()
      }),
    }),
  ])
  const during = await setting.addPage('during.jpg')
  await slow.arrived
  // As a restart does: every session of this database ends, whatever it is doing.
  await withClient(setting.database.adminUrl, (admin) =>
    admin.query(
      'SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE datname = current_database() AND pid <> pg_backend_pid()',
    ),
  )
  slow.open()
  await waitFor(async () => (await setting.pageOf(during)).state === 'read', { what: 'the page to be read', deadline_ms: 30_000 })
  const after = await waitFor(() => setting.addPage('after.jpg'), { what: 'the database to take a page' })
  await setting.waitForState(after, 'read')
  await worker.stop(5_000)
})

it('a worker told to stop hands back the page in hand, and another takes it up at once', async () => {
  const never = gate()
  const first = await setting.start((source) => [
    ...others(),
    pageReadJob({
      source,
      files: memoryStore(),
      reader: readerThat(async () => {
        await never.pass()
        return reads()
      }),
    }),
  ])
  const pageId = await setting.addPage('handed-back.jpg')
  await never.arrived
  await first.stop(0)
  await setting.start((source) => [...others(), pageReadJob({ source, files: memoryStore(), reader: readerThat(reads) })])
  await setting.waitForState(pageId, 'read', 10_000)
})

it('a worker without a handler, or with two, does not start', () => {
  const [split, mail] = noneOf('upload-split', 'mail-send')
  expect(() => checkHandlers([split!, mail!])).toThrow('page-read has no handler')
  expect(() => checkHandlers([split!, split!, mail!])).toThrow('page-read has no handler')
  expect(() => checkHandlers([...noneOf('upload-split', 'page-read', 'webhook-send', 'mail-send', 'mail-send')])).toThrow(
    'mail-send has two handlers',
  )
})

import { afterAll, beforeAll, expect, test } from 'vitest'
import type { ChangeList } from '../../shared/schemas/change.ts'
import type { RecordRow } from '../../shared/schemas/record.ts'
import type { Sheet } from '../../shared/schemas/sheet.ts'
import { createRecord } from '../builders/record.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let clerk: TestAgent
let analyst: TestAgent
let demonstrator: Awaited<ReturnType<TestServer['signIn']>>

beforeAll(async () => {
  server = await startTestServer()
  await createGoldenRegisters(server.deps.source)
  clerk = await server.signIn('clerk')
  analyst = await server.signIn('analyst')
  demonstrator = await server.signIn('demonstrator')
})
afterAll(() => server.close())

const changesAfter = async (after: number, limit = 100) =>
  (await analyst.get(`/changes?after=${after}&limit=${limit}`)).body as ChangeList
const enter = () => createRecord(server, clerk, demonstrator.user)

/** A client that keeps a copy by the feed alone, from where it stopped. */
function createCopy() {
  const records = new Map<number, RecordRow>()
  let after = 0
  return {
    records,
    /** Takes one page; `lose` forgets the answer, as a client does that is killed before it wrote it down. */
    async step(lose: boolean): Promise<boolean> {
      const { changes, next, more } = await changesAfter(after, 2)
      if (lose) return true
      for (const { number, record } of changes) {
        if (record) records.set(number, record)
        else records.delete(number)
      }
      after = next
      return more
    },
  }
}

test('entering, challenging and entering again stand in the feed in order, with the record as it is now', async () => {
  const start = (await changesAfter(0)).next
  const { recordNumber, sheetId } = await enter()
  await analyst.post(`/records/${recordNumber}/challenge`, { reason: 'speed cannot be' })
  const { version } = (await clerk.get(`/sheets/${sheetId}`)).body as Sheet
  await clerk.post(`/sheets/${sheetId}/enter`, { version, answer: 'the watch was read twice' })
  const { changes } = await changesAfter(start)
  expect(changes.map((c) => [c.what, c.number, c.version])).toEqual([
    ['entered', recordNumber, 1],
    ['changed', recordNumber, 1],
    ['changed', recordNumber, 2],
  ])
  expect(changes.every((c) => c.record?.version === 2 && c.record.state === 'entered')).toBe(true)
})

test('a record that is taken out of the book is withdrawn in the feed', async () => {
  const { recordNumber } = await enter()
  const start = (await changesAfter(0)).next
  await server.deps.source.query('DELETE FROM records WHERE number = $1', [recordNumber])
  expect((await changesAfter(start)).changes).toMatchObject([{ what: 'withdrawn', number: recordNumber, record: null }])
})

test('a transaction that ends late comes after those that ended before it, and is not missed', async () => {
  const { recordNumber } = await enter()
  const start = (await changesAfter(0)).next
  const slow = server.deps.source.createQueryRunner()
  await slow.startTransaction()
  // Written first, seen last.
  await slow.query("UPDATE records SET challenge_reason = 'late' WHERE number = $1", [recordNumber])
  const quick = await enter()
  const before = await changesAfter(start)
  expect(before.changes.map((c) => c.number)).toEqual([quick.recordNumber])
  await slow.commitTransaction()
  await slow.release()
  expect((await changesAfter(before.next)).changes.map((c) => c.number)).toEqual([recordNumber])
})

test('nothing that was rolled back is told', async () => {
  const { recordNumber } = await enter()
  const start = (await changesAfter(0)).next
  const runner = server.deps.source.createQueryRunner()
  await runner.startTransaction()
  await runner.query("UPDATE records SET gear = 'H9' WHERE number = $1", [recordNumber])
  await runner.rollbackTransaction()
  await runner.release()
  expect(await changesAfter(start)).toEqual({ changes: [], next: start, more: false })
})

test('a client that is interrupted at random ends with an equal copy', async () => {
  const copy = createCopy()
  const numbers: number[] = []
  let seed = 20_261_201
  const chance = () => {
    seed = (seed * 48_271) % 2_147_483_647
    return seed / 2_147_483_647
  }
  const write = async () => {
    const number = numbers[Math.floor(chance() * numbers.length)]
    if (number === undefined || chance() < 0.4) numbers.push((await enter()).recordNumber)
    else if (chance() < 0.8)
      await server.deps.source.query('UPDATE records SET gear = $2 WHERE number = $1', [number, `L${seed % 9}`])
    else await server.deps.source.query('DELETE FROM records WHERE number = $1', [number])
  }
  for (let round = 0; round < 12; round += 1) {
    await Promise.all([write(), copy.step(chance() < 0.4), write(), copy.step(chance() < 0.4)])
  }
  while (await copy.step(false));
  const book: RecordRow[] = []
  for (let after: number | null = null; ; ) {
    const page = (await analyst.get(`/records${after === null ? '' : `?after=${after}`}`)).body as {
      records: RecordRow[]
      next: number | null
    }
    book.push(...page.records)
    if (page.next === null) break
    after = page.next
  }
  expect(numbers.length).toBeGreaterThan(2)
  expect([...copy.records.values()].sort((a, b) => b.number - a.number)).toEqual(book)
})

import sharp from 'sharp'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { takeInPage } from '../../server/db/intake/take-in-page.ts'
import type { Sheet, SheetRow } from '../../shared/schemas/sheet.ts'
import type { Upload } from '../../shared/schemas/upload.ts'
import { buildReadings } from '../builders/readings.ts'
import { buildOutcome, createArrivedSheet, createGoldenRegisters, createPage, readingsOf } from '../builders/sheet.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

type Person = Awaited<ReturnType<TestServer['signIn']>>
let server: TestServer
let clerk: Person
let writer: Person
let sender: Person
let stranger: Person

beforeAll(async () => {
  server = await startTestServer()
  clerk = await server.signIn('clerk')
  ;[writer, sender, stranger] = [
    await server.signIn('demonstrator'),
    await server.signIn('demonstrator'),
    await server.signIn('demonstrator'),
  ]
  await createGoldenRegisters(server.deps.source)
})
afterAll(() => server.close())

const written = (number: number | null, doubtful = {}) =>
  buildOutcome({ readings: readingsOf(buildReadings({ demonstrator_id: number }), doubtful) })
const ownerOf = async (id: string): Promise<string> =>
  (await server.deps.source.query('SELECT owner_id AS owner FROM sheets WHERE id = $1', [id]))[0].owner
const listed = async (person: Person) =>
  ((await person.get('/sheets')).body as { sheets: SheetRow[] }).sheets.map((sheet) => sheet.id)

test('a sheet belongs to the demonstrator whose number is written on it, and who sent it sees it too', async () => {
  const id = await createArrivedSheet(server.deps.source, sender.user.id, written(writer.user.number))
  expect(await ownerOf(id)).toBe(writer.user.id)
  for (const person of [writer, sender]) {
    expect((await person.get(`/sheets/${id}`)).status).toBe(200)
    expect(await listed(person)).toContain(id)
  }
  expect((await stranger.get(`/sheets/${id}`)).status).toBe(404)
  expect(await listed(stranger)).not.toContain(id)
  expect(((await stranger.get('/sheets?desk=true')).body as { sheets: SheetRow[] }).sheets).toEqual([])
})

test('a number in doubt or unknown gives the sheet to nobody else; settled by a clerk, it does', async () => {
  const doubtful = { demonstrator_id: [{ value: writer.user.number, p: 0.6 }] }
  const id = await createArrivedSheet(server.deps.source, sender.user.id, written(writer.user.number, doubtful))
  expect(await ownerOf(id)).toBe(sender.user.id)
  const { version } = (await clerk.get(`/sheets/${id}`)).body as Sheet
  await clerk.post(`/sheets/${id}/settle-reading`, { version, key: 'demonstrator_id', how: 'kept' })
  expect(await ownerOf(id)).toBe(writer.user.id)
})

test('sending back writes to the owner and to who sent it', async () => {
  const id = await createArrivedSheet(server.deps.source, sender.user.id, written(writer.user.number))
  const { version } = (await clerk.get(`/sheets/${id}`)).body as Sheet
  const back = (await clerk.post(`/sheets/${id}/send-back`, { version, reason: 'Which unit is the area in?' })).body as Sheet
  expect(back.history.at(-1)?.text).toContain(`sent back to ${writer.user.name} and ${sender.user.name}`)
  const mails = await server.deps.source.query('SELECT recipient FROM mails WHERE body LIKE $1', [`%${id}%`])
  expect(mails.map((m: { recipient: string }) => m.recipient).sort()).toEqual([writer.user.email, sender.user.email].sort())
})

test('the line of the trail counts what the desk counts', async () => {
  const id = await createArrivedSheet(server.deps.source, sender.user.id, written(9998))
  const sheet = (await clerk.get(`/sheets/${id}`)).body as Sheet
  expect(sheet.history[0]?.text).toMatch(
    new RegExp(`: ${sheet.readings.length} readings clear; the rules add ${sheet.openDoubts} doubts?$`),
  )
})

test('a page that cannot be read from the corners a clerk set says what a clerk can do, and keeps the corners', async () => {
  const page = await createPage(server.deps.source, sender.user.id)
  const noSheet = { kind: 'take again', code: 'no sheet', advice: 'Lay it flat.' } as const
  const { sheetId } = await server.deps.source.transaction((db) => takeInPage(db, { ...page, outcome: noSheet }))
  const { version } = (await clerk.get(`/sheets/${sheetId}`)).body as Sheet
  const corners = [
    [1, 2],
    [300, 4],
    [300, 400],
    [5, 400],
  ]
  const layout = { layout: 'tillage', layoutVersion: 1, sheetCode: null }
  expect((await clerk.post(`/sheets/${sheetId}/place`, { version, ...layout, corners })).status).toBe(200)
  await server.deps.source.query("UPDATE pages SET state = 'being read', attempt_token = $2 WHERE id = $1", [
    page.pageId,
    page.attemptToken,
  ])
  const blurred = { kind: 'take again', code: 'too blurred', advice: 'Hold the phone still.' } as const
  await server.deps.source.transaction((db) => takeInPage(db, { ...page, outcome: blurred }))
  const sheet = (await clerk.get(`/sheets/${sheetId}`)).body as Sheet
  const reason = 'It could not be read from these corners: the picture is blurred. Key it beside the picture, or send it back.'
  expect(sheet).toMatchObject({ state: 'unreadable', reason, why: reason, pages: [{ placedCorners: corners }] })
})

test('a file that somebody else sent before names nothing of theirs', async () => {
  const picture = await sharp({ create: { width: 64, height: 48, channels: 3, background: '#abc' } })
    .jpeg()
    .toBuffer()
  const send = async (person: Person, name: string) => {
    const form = new FormData()
    form.append('files', new File([new Uint8Array(picture)], name))
    return ((await person.send('/uploads', form)).body as { uploads: Upload[] }).uploads[0]!
  }
  const first = await send(sender, 'the-neighbours-field.jpg')
  const page = first.pages[0]!
  await server.deps.source.query("UPDATE pages SET state = 'being read', attempt_token = $1 WHERE id = $1", [page.id])
  await server.deps.source.transaction((db) =>
    takeInPage(db, { pageId: page.id, attemptToken: page.id, outcome: written(sender.user.number) }),
  )
  const own = (await sender.get(`/uploads/${first.id}`)).body as Upload
  expect(own.pages[0]?.sheet?.state).toMatch(/waiting|settled/)
  const again = await send(stranger, 'mine.jpg')
  expect(again).toMatchObject({ fileName: 'mine.jpg', seenBefore: true, state: 'done' })
  expect(again.pages).toEqual([{ id: page.id, number: 1, state: 'read', takeAgain: null, sheet: null }])
  expect((await stranger.get(`/uploads/${first.id}`)).status).toBe(404)
})

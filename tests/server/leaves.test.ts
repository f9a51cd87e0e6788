import { PDFiumLibrary } from '@hyzyla/pdfium'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { type FakeSmtp, type ReceivedMail, startFakeSmtp } from '../../server/mail/fake.ts'
import { createMailer, type Mailer } from '../../server/mail/mailer.ts'
import type { Demonstration } from '../../shared/schemas/demonstration.ts'
import type { LeafStatus } from '../../shared/schemas/leaf.ts'
import type { User } from '../../shared/schemas/user.ts'
import type { Readings } from '../../shared/trial/readings.ts'
import { mailSendJob } from '../../worker/jobs/mail-send.job.ts'
import { preparePlan } from '../builders/demonstration.ts'
import { enterRun } from '../builders/entered-run.ts'
import { createGoldenRegisters } from '../builders/sheet.ts'
import type { TestAgent } from '../support/agent.ts'
import { startTestServer, type TestServer } from '../support/server.ts'

let server: TestServer
let smtp: FakeSmtp
let mailer: Mailer
let [demonstrator, clerk]: Array<TestAgent & { user: User }> = []
let received: ReceivedMail[] = []
let day = 26

beforeAll(async () => {
  server = await startTestServer()
  await createGoldenRegisters(server.deps.source)
  demonstrator = await server.signIn('demonstrator')
  clerk = await server.signIn('clerk')
  smtp = await startFakeSmtp({ port: 0, onMail: (mail) => void received.push(mail) })
  mailer = createMailer(smtp.url, 'office@fields.example')
})
beforeEach(() => {
  received = []
})
afterAll(async () => {
  mailer.close()
  await smtp.close()
  await server.close()
})

/** An entered run of a plan whose farmer has an address. */
async function entered(readings: Readings = {}, email = 'matis@fields.example') {
  day -= 1
  const trial_date = `2026-11-${String(day).padStart(2, '0')}`
  const farmer = { name: 'Matis Orrel', phone: '0555 0142', email }
  const plan = await preparePlan(server.deps.source.manager, demonstrator!.user.id, { heldOn: trial_date, farmer })
  const planned = (await demonstrator!.post('/demonstrations', plan)).body as Demonstration
  const number = await enterRun(server, clerk!, {
    sender: demonstrator!.user.id,
    readings: { trial_date, consent_contact: 'yes', demonstrator_id: demonstrator!.user.number, ...readings },
    sheetCode: planned.trials[0]!.runs[0]!.sheetCode!,
  })
  return { number, planned }
}

const send = (number: number) => demonstrator!.post(`/records/${number}/leaf`, {})
const status = async (number: number) => (await demonstrator!.get(`/records/${number}/leaf`)).body as LeafStatus
/** What the worker does with the mails that wait. */
async function deliver() {
  const rows: { id: string }[] = await server.deps.source.query('SELECT id FROM mails')
  const job = mailSendJob({ source: server.deps.source, mailer })
  for (const { id } of rows) await job.handle({ mailId: id }, { signal: AbortSignal.timeout(30_000) })
}

async function textOf(pdf: Buffer): Promise<{ pages: number; text: string }> {
  const library = await PDFiumLibrary.init()
  const document = await library.loadDocument(pdf)
  const text = [...document.pages()].map((page) => page.getText()).join('\n')
  const pages = document.getPageCount()
  document.destroy()
  library.destroy()
  return { pages, text: text.replace(/\s+/g, ' ') }
}

describe('the leaf', () => {
  it('is one page that says what was measured, for whom it holds, and how to withdraw consent', async () => {
    const { number } = await entered()
    const { pages, text } = await textOf((await demonstrator!.get(`/records/${number}/leaf.pdf`)).bytes)
    expect(pages).toBe(1)
    for (const words of ['14.07', 'give or take 0.26', 'Matis Orrel', 'For this field, on this day', 'withdraw your consent'])
      expect(text, words).toContain(words)
    expect(text).not.toContain('Superseded')
  })

  it('keeps the farmer’s name from the analyst', async () => {
    const { number } = await entered()
    const analyst = await server.signIn('analyst')
    expect((await textOf((await analyst.get(`/records/${number}/leaf.pdf`)).bytes)).text).not.toContain('Matis Orrel')
    expect((await analyst.post(`/records/${number}/leaf`, {})).status).toBe(403)
  })

  it('goes to the farmer by mail with the page, once, however often it is asked for and the job runs', async () => {
    const { number } = await entered()
    const answers = await Promise.all([send(number), send(number), send(number)])
    expect(answers.map((a) => a.status).sort()).toEqual([202, 409, 409])
    await deliver()
    await deliver()
    expect(received.map((mail) => mail.to)).toEqual([['matis@fields.example']])
    expect(received[0]!.raw.toString()).toContain(`filename=leaf-${number}.pdf`)
    expect(await status(number)).toMatchObject({
      why: 'The leaf of this version has gone out already.',
      sent: [{ version: 1, state: 'sent' }],
    })
  })

  it.each([
    ['the farmer did not agree', { consent_contact: 'no' }, 'matis@fields.example', /did not agree/],
    ['there is no address', {}, '', /no e-mail address/],
  ] as const)('does not go out where %s', async (_, readings, email, why) => {
    const { number, planned } = await entered(readings, email)
    // Only a missing address is mended in the plan.
    expect((await status(number)).planId).toBe(email === '' ? planned.id : null)
    expect(await send(number)).toMatchObject({ status: 409, body: { error: { message: expect.stringMatching(why) } } })
    await deliver()
    expect(received).toEqual([])
  })

  it('does not go out any more once consent is withdrawn, and the address is erased from the outbox', async () => {
    const { number, planned } = await entered()
    expect((await send(number)).status).toBe(202)
    const withdrawn = await demonstrator!.post(`/demonstrations/${planned.id}/withdraw-consent`, { reason: 'the farmer called' })
    expect(withdrawn.status).toBe(200)
    await deliver()
    expect(received).toEqual([])
    const mails: unknown[] = await server.deps.source.query(
      "SELECT 1 FROM mails WHERE recipient = 'matis@fields.example' AND state <> 'sent'",
    )
    expect(mails).toEqual([])
    expect((await status(number)).sent[0]).toMatchObject({ state: 'failed', error: 'Consent was withdrawn before it went out.' })
  })

  it('says that it is superseded once a new version stands, and the new one may go out', async () => {
    const { number } = await entered()
    await send(number)
    const analyst = await server.signIn('analyst')
    const record = (await analyst.post(`/records/${number}/challenge`, { reason: 'the jar end looks like 2200' })).body as {
      sheetId: string
    }
    expect((await send(number)).status).toBe(409)
    const sheet = (await clerk!.get(`/sheets/${record.sheetId}`)).body as { version: number }
    const again = { version: sheet.version, answer: 'it reads 2300' }
    expect((await clerk!.post(`/sheets/${record.sheetId}/enter`, again)).status).toBe(200)
    const old = await textOf((await demonstrator!.get(`/records/${number}/leaf.pdf?version=1`)).bytes)
    expect(old.text).toContain('Superseded')
    const fresh = await textOf((await demonstrator!.get(`/records/${number}/leaf.pdf`)).bytes)
    expect(fresh.text).toContain('takes the place of the one with version 1')
    expect((await send(number)).status).toBe(202)
  })
})

import { afterAll, beforeAll, beforeEach, expect, it } from 'vitest'
import { sendJob } from '../../server/db/queue.ts'
import { addMail } from '../../server/db/repositories/mail.ts'
import { type FakeSmtp, type ReceivedMail, startFakeSmtp } from '../../server/mail/fake.ts'
import { createMailer } from '../../server/mail/mailer.ts'
import { mailSendJob } from '../../worker/jobs/mail-send.job.ts'
import { waitFor } from '../support/wait-for.ts'
import { createSetting, noneOf, type Setting } from './setting.ts'

let setting: Setting
let smtp: FakeSmtp
let received: ReceivedMail[] = []
let refusal: Error | undefined

beforeAll(async () => {
  setting = await createSetting()
  smtp = await startFakeSmtp({
    port: 0,
    onMail: (mail) => {
      if (refusal) throw refusal
      received.push(mail)
    },
  })
  // Production waits a minute before the first repeat.
  await setting.source.query(
    "UPDATE pgboss.queue SET retry_delay = 0, retry_backoff = false, retry_limit = 20 WHERE name = 'mail-send'",
  )
  await setting.start((source) => [
    ...noneOf('upload-split', 'page-read'),
    mailSendJob({ source, mailer: createMailer(smtp.url, 'office@fields.example') }),
  ])
})
beforeEach(() => {
  received = []
  refusal = undefined
})
afterAll(async () => {
  await setting.close()
  await smtp.close()
})

const queue = () =>
  setting.source.transaction(async (db) => {
    const mailId = await addMail(db, { to: 'anna@fields.example', subject: 'Sheet sent back', text: 'The jar end is missing.' })
    await sendJob(setting.boss, db, 'mail-send', { mailId })
    return mailId
  })
const mailOf = async (id: string) =>
  (await setting.source.query('SELECT state, error, sent_at AS "sentAt" FROM mails WHERE id = $1', [id]))[0]
const waitForMail = (id: string, state: string) =>
  waitFor(async () => (await mailOf(id)).state === state, { what: `the mail to be ${state}`, deadline_ms: 20_000 })

it('a mail goes out with what it tells, and is marked sent', async () => {
  const id = await queue()
  await waitForMail(id, 'sent')
  expect(received).toHaveLength(1)
  expect(received[0]).toMatchObject({ to: ['anna@fields.example'] })
  expect(received[0]!.raw.toString()).toContain('The jar end is missing.')
  expect(await mailOf(id)).toMatchObject({ error: null, sentAt: expect.any(Date) })
})

it('a mail that is refused for good is marked failed with the reason, and not tried again', async () => {
  refusal = Object.assign(new Error('No such mailbox'), { responseCode: 550 })
  const id = await queue()
  await waitForMail(id, 'failed')
  expect((await mailOf(id)).error).toContain('No such mailbox')
})

it('a mail the server cannot take now is tried again', async () => {
  refusal = new Error('Mailbox busy')
  const id = await queue()
  await waitFor(async () => (await mailOf(id)).error?.includes('Mailbox busy'), { what: 'the first attempt to fail' })
  refusal = undefined
  await waitForMail(id, 'sent')
  expect((await mailOf(id)).error).toBeNull()
})

it('a mail no attempt could hand over is marked failed with the last trouble', async () => {
  refusal = new Error('Mailbox busy')
  const id = await queue()
  await waitForMail(id, 'failed')
  expect((await mailOf(id)).error).toContain('Mailbox busy')
})

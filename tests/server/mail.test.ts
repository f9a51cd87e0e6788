import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { type FakeSmtp, type ReceivedMail, startFakeSmtp } from '../../server/mail/fake.ts'
import { createMailer } from '../../server/mail/mailer.ts'
import { TransientError, UserError } from '../../shared/errors.ts'

describe('a mail', () => {
  let received: ReceivedMail[] = []
  let refusal: Error | undefined
  let smtp: FakeSmtp

  beforeAll(async () => {
    smtp = await startFakeSmtp({
      port: 0,
      onMail: (mail) => {
        if (refusal !== undefined) throw refusal
        received.push(mail)
      },
    })
  })
  afterAll(() => smtp.close())
  beforeEach(() => {
    received = []
    refusal = undefined
  })

  it('arrives at its receiver with subject and text', async () => {
    const mailer = createMailer(smtp.url, 'Trial office <office@fields.example>')
    await mailer.send({
      to: 'anna@fields.example',
      subject: 'Sheet sent back',
      text: 'The jar end is missing.',
      messageId: 'one@fields.example',
    })
    mailer.close()
    expect(received).toHaveLength(1)
    expect(received[0]).toMatchObject({ from: 'office@fields.example', to: ['anna@fields.example'] })
    const raw = received[0]?.raw.toString()
    for (const line of ['Subject: Sheet sent back', 'Message-ID: <one@fields.example>', 'The jar end is missing.'])
      expect(raw).toContain(line)
  })

  it('that the server cannot take now is a passing trouble', async () => {
    refusal = new Error('Mailbox busy')
    const mailer = createMailer(smtp.url, 'office@fields.example')
    await expect(mailer.send({ to: 'anna@fields.example', subject: 's', text: 't' })).rejects.toThrow(TransientError)
    mailer.close()
  })

  it('that the server refuses for good is not tried again', async () => {
    refusal = Object.assign(new Error('No such mailbox'), { responseCode: 550 })
    const mailer = createMailer(smtp.url, 'office@fields.example')
    await expect(mailer.send({ to: 'nobody@fields.example', subject: 's', text: 't' })).rejects.toThrow(
      /refused the mail to nobody@fields.example: .*No such mailbox/,
    )
    mailer.close()
  })

  it('to something that is no address is refused', async () => {
    const mailer = createMailer(smtp.url, 'office@fields.example')
    const attempt = mailer.send({ to: 'an address', subject: 's', text: 't' })
    await expect(attempt).rejects.toThrow(UserError)
    mailer.close()
  })

  it('for a server that is away is a passing trouble', async () => {
    const away = await startFakeSmtp({ port: 0, onMail: () => undefined })
    await away.close()
    const mailer = createMailer(away.url, 'office@fields.example')
    await expect(mailer.send({ to: 'anna@fields.example', subject: 's', text: 't' })).rejects.toThrow('could not be handed over')
    mailer.close()
  })
})

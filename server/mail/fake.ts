import type { AddressInfo } from 'node:net'
import { buffer } from 'node:stream/consumers'
import { SMTPServer } from 'smtp-server'

/** A mail as it came over the wire. */
export interface ReceivedMail {
  from: string
  to: string[]
  /** The whole message, headers and all. */
  raw: Buffer
}

/** An SMTP server for this machine only, that delivers to a function instead of to anybody. */
export interface FakeSmtp {
  port: number
  url: string
  close(): Promise<void>
}

interface Refusal extends Error {
  responseCode?: number
}

/**
 * Starts it on loopback.
 * @param options.port 0 for any free one
 * @param options.onMail what takes each mail; when it throws, the sender is told to try again (451),
 *   or what the error's `responseCode` says
 */
export async function startFakeSmtp(options: {
  port: number
  onMail: (mail: ReceivedMail) => void | Promise<void>
}): Promise<FakeSmtp> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    onData(stream, session, done) {
      const envelope = { from: addressOf(session.envelope.mailFrom), to: session.envelope.rcptTo.map(({ address }) => address) }
      buffer(stream)
        .then((raw) => options.onMail({ ...envelope, raw }))
        .then(
          () => done(),
          (cause: Refusal) => done(Object.assign(cause, { responseCode: cause.responseCode ?? 451 })),
        )
    },
  })
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(options.port, '127.0.0.1', () => {
      server.off('error', reject)
      resolve()
    })
  })
  // A connection that breaks is the sender's trouble and is logged there.
  server.on('error', () => undefined)
  const { port } = server.server.address() as AddressInfo
  return { port, url: `smtp://127.0.0.1:${port}`, close: () => new Promise((resolve) => server.close(() => resolve())) }
}

function addressOf(sender: { address: string } | false): string {
  return sender === false ? '' : sender.address
}

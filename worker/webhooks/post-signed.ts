/** One message, signed by the Standard Webhooks specification, and nothing followed. */
import { createHmac } from 'node:crypto'
import { request as requestHttp } from 'node:http'
import { request as requestHttps } from 'node:https'
import { isIP } from 'node:net'
import { isPublicAddress, lookupPublic, PrivateAddress } from './public-address.ts'

/** The specification asks for 15 to 30 s; the job that sends has 24 s. */
const TIMEOUT_MS = 15_000
const SECRET_PREFIX = 'whsec_'

export interface Message {
  /** The same at every attempt. */
  id: string
  url: string
  /** `whsec_` and base64. */
  secret: string
  payload: string
}

/** HMAC-SHA256 over "id.timestamp.payload", base64, as `v1,…`. */
export function signatureOf({ id, secret, payload }: Omit<Message, 'url'>, timestamp_s: number): string {
  const key = Buffer.from(secret.slice(SECRET_PREFIX.length), 'base64')
  return `v1,${createHmac('sha256', key).update(`${id}.${timestamp_s}.${payload}`).digest('base64')}`
}

/**
 * @param allowPrivate lets it go to addresses of a private network (WEBHOOK_ALLOW_PRIVATE)
 * @returns the HTTP status of the answer, whatever it is
 * @throws Error when nothing was answered; PrivateAddress when the address may not be used
 */
export function postSigned(
  message: Message,
  { allowPrivate, signal }: { allowPrivate: boolean; signal: AbortSignal },
): Promise<number> {
  const url = new URL(message.url)
  const host = url.hostname.replace(/^\[|\]$/g, '')
  // An address in figures is connected to without asking for it.
  if (!allowPrivate && isIP(host) !== 0 && !isPublicAddress(host)) return Promise.reject(new PrivateAddress(host))
  const timestamp_s = Math.floor(Date.now() / 1000)
  const headers = {
    'Content-Type': 'application/json',
    'Content-Length': Buffer.byteLength(message.payload),
    'User-Agent': 'Sheafbook',
    'webhook-id': message.id,
    'webhook-timestamp': timestamp_s,
    'webhook-signature': signatureOf(message, timestamp_s),
  }
  const request = url.protocol === 'https:' ? requestHttps : requestHttp
  return new Promise((resolve, reject) => {
    const sending = request(url, {
      method: 'POST',
      headers,
      // A connection of its own: one kept from before would not be looked up again.
      agent: false,
      signal: AbortSignal.any([signal, AbortSignal.timeout(TIMEOUT_MS)]),
      ...(allowPrivate ? {} : { lookup: lookupPublic }),
    })
    sending.on('error', reject)
    sending.on('response', (answer) => {
      resolve(answer.statusCode ?? 0)
      // What it says beside its status is not read, however long it is.
      answer.destroy()
    })
    sending.end(message.payload)
  })
}

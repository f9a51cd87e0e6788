/** An application that listens, and ends in order. */
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import type { Express } from 'express'

/** Requests in hand get this long; the process has 20 s in all. */
const GRACE_MS = 12_000
const SWEEP_MS = 50

export interface Listener {
  /** Starts once; a second call waits for the first. Returns the port (0 in the settings takes any). */
  start(): Promise<number>
  /** Takes nothing new, lets running requests end, then closes. Safe to call twice. */
  stop(): Promise<void>
}

export function createListener(app: Express, at: { host: string; port: number }): Listener {
  const server = createServer(app)
  let starting: Promise<number> | undefined
  let stopping: Promise<void> | undefined
  const start = () =>
    new Promise<number>((resolve, reject) => {
      server.once('error', reject)
      server.listen(at.port, at.host, () => resolve((server.address() as AddressInfo).port))
    })
  const stop = () =>
    new Promise<void>((resolve) => {
      if (!server.listening) return resolve()
      const insist = setTimeout(() => server.closeAllConnections(), GRACE_MS)
      // A browser keeps its connection open after its last answer.
      const sweep = setInterval(() => server.closeIdleConnections(), SWEEP_MS)
      server.close(() => {
        clearTimeout(insist)
        clearInterval(sweep)
        resolve()
      })
    })
  return {
    start: () => {
      starting ??= start()
      return starting
    },
    stop: () => {
      stopping ??= stop()
      return stopping
    },
  }
}

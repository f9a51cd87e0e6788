import { createServer } from 'node:net'

/** Whether nobody listens on this loopback port. */
export function isFree(port: number, host = '127.0.0.1'): Promise<boolean> {
  return listenOnce(port, host).then(
    () => true,
    () => false,
  )
}

/** The wanted port when it is free, otherwise one the system gives out. */
export async function freePort(wanted = 0, host = '127.0.0.1'): Promise<number> {
  return listenOnce(wanted, host).catch(() => listenOnce(0, host))
}

function listenOnce(port: number, host: string): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.once('error', reject)
    probe.listen({ port, host, exclusive: true }, () => {
      const address = probe.address()
      const taken = typeof address === 'object' && address !== null ? address.port : port
      probe.close(() => resolve(taken))
    })
  })
}

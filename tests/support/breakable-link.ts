import { type AddressInfo, connect, createServer, type Server, type Socket } from 'node:net'

/** A way to a database that can be cut, as a restart cuts it: standing connections end, new ones are refused. */
export interface BreakableLink {
  /** The database's address through the link. */
  url: string
  cut(): Promise<void>
  mend(): Promise<void>
  close(): Promise<void>
}

export async function linkTo(databaseUrl: string): Promise<BreakableLink> {
  const target = new URL(databaseUrl)
  const sockets = new Set<Socket>()
  let server: Server | undefined
  const listen = (port: number) =>
    new Promise<number>((resolve, reject) => {
      const opened = createServer((near) => join(near, connect(Number(target.port || 5432), target.hostname)))
      server = opened
      opened.once('error', reject)
      opened.listen(port, '127.0.0.1', () => resolve((opened.address() as AddressInfo).port))
    })
  const join = (near: Socket, far: Socket) => {
    for (const [one, other] of [
      [near, far],
      [far, near],
    ] as const) {
      sockets.add(one)
      one.on('error', () => undefined)
      one.on('close', () => {
        sockets.delete(one)
        other.destroy()
      })
      one.pipe(other)
    }
  }
  const cut = async () => {
    const ending = server
    server = undefined
    for (const socket of sockets) socket.destroy()
    if (ending) await new Promise((resolve) => ending.close(resolve))
  }
  const port = await listen(0)
  const url = new URL(databaseUrl)
  url.hostname = '127.0.0.1'
  url.port = String(port)
  return { url: url.href, cut, mend: async () => void (await listen(port)), close: cut }
}

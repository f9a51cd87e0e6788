import { randomUUID } from 'node:crypto'
import { mkdirSync } from 'node:fs'
import { writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { type FakeSmtp, startFakeSmtp } from '../../mail/fake.ts'
import { freePort } from '../../postgres/free-port.ts'

/**
 * A mail server for this machine: it takes every mail and keeps it as it came in `folder`.
 * @param port wanted; another is taken when it is busy
 */
export async function startLocalMail(port: number, folder: string): Promise<FakeSmtp> {
  mkdirSync(folder, { recursive: true })
  return startFakeSmtp({
    port: await freePort(port),
    onMail: ({ raw }) => {
      const when = new Date().toISOString().replaceAll(':', '-')
      return writeFile(join(folder, `${when}-${randomUUID().slice(0, 8)}.eml`), raw, { mode: 0o640 })
    },
  })
}
